// The published JSON Schemas of everything that is printed or written as JSON.
import type { TSchema } from 'typebox';
import { analysisJsonSchema } from '../analysis/schema.ts';
import { writeSchema } from '../spec/publish.ts';
import { PathSchema, RunSchema } from './results.ts';
import { CompareSchema } from './compare.ts';
import { LandscapeSchema, MatrixSchema, ModelSchema, ModuleSchema, PackedSchema } from './stages.ts';
import { SweepSchema, SweepSummarySchema } from './sweep.ts';
import { CheckSchema, InputsSchema, LogSchema } from './work.ts';

const own: Readonly<Record<string, readonly [title: string, schema: TSchema]>> = {
  check: ['What `skein check --json` prints', CheckSchema],
  compare: ['What `skein compare --json` prints, and results.json of it', CompareSchema],
  inputs: ['run.json: everything that decides a result', InputsSchema],
  landscape: ['What `skein show MODEL landscape --json` prints', LandscapeSchema],
  log: ['log.json: how the work went', LogSchema],
  matrix: ['What `skein show MODEL matrix --json` and `skein compile -o FILE.json` write', MatrixSchema],
  model: ['What `skein show MODEL model --json` prints', ModelSchema],
  module: ['The custom section `skein-model` of `skein compile -o FILE.wasm`', ModuleSchema],
  packed: ['What `skein show MODEL packed --json` prints', PackedSchema],
  path: ['What `skein path --json` prints', PathSchema],
  sweep: ['manifest.json: what a sweep is', SweepSchema],
  'sweep-summary': [
    'What `skein sweep --json` and `skein sweep summary --json` print, and summary.json',
    SweepSummarySchema,
  ],
  run: ['What `skein run --json` prints, and results.json', RunSchema],
};

export const formatNames: readonly string[] = ['analysis', 'spec', ...Object.keys(own)].sort();

/** The text of a schema; null where there is none of this name. */
export function schemaText(name: string): string | null {
  if (name === 'spec') return writeSchema();
  if (name === 'analysis') return jsonText(analysisJsonSchema);
  const found = Object.hasOwn(own, name) ? own[name] : undefined;
  if (found === undefined) return null;
  const [title, schema] = found;
  return jsonText({ $schema: 'https://json-schema.org/draft/2020-12/schema', title, ...schema });
}

function jsonText(schema: unknown): string {
  return `${JSON.stringify(schema, null, 2)}\n`;
}
