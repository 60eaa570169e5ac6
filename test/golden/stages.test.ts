// Every model that comes with the tool, printed at every stage of the pipeline.
import { readdirSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { understand } from '../../src/cli/command/check.ts';
import { describeImage } from '../../src/compile/image/describe.ts';
import type { Analysis } from '../../src/analysis/schema.ts';
import type { CompiledModel } from '../../src/pipeline.ts';
import { checkText } from '../../src/report/check-text.ts';
import { landscapeText } from '../../src/report/show/landscape.ts';
import { analysisText } from '../../src/report/analysis/analysis-text.ts';
import { matrixText } from '../../src/report/show/matrix.ts';
import { modelText } from '../../src/report/show/model.ts';
import { printSpec } from '../../src/spec/print.ts';
import { expectGolden } from './golden.ts';
import { compileModel, modelNames } from './models.ts';

const style = { colour: false, width: 100 };

const stages: Readonly<Record<string, (compiled: CompiledModel) => string>> = {
  spec: ({ spec }) => printSpec(spec),
  model: ({ model }) => modelText(model),
  landscape: landscapeText,
  matrix: matrixText,
  packed: ({ image }) => fixedDigits(describeImage(image)),
  check: (compiled) => checkText(understand(compiled), style),
  analyse: (compiled) => analysisText(analysed(compiled), style),
  'analyse-json': (compiled) => JSON.stringify(analysed(compiled), rounded, 1),
};

describe.each(modelNames)('%s', (name) => {
  const compiled = compileModel(name);

  test.each(Object.keys(stages))('%s', (stage) => {
    const text = `${stages[stage]?.(compiled).trimEnd() ?? ''}\n`;
    expectGolden(new URL(`${name}/${stage}.txt`, import.meta.url), text);
  });
});

test('no text is left of a model or a stage that is gone', () => {
  const found = readdirSync(new URL('.', import.meta.url), { withFileTypes: true });
  const folders = found.filter((entry) => entry.isDirectory()).map((entry) => entry.name);
  expect(folders.sort()).toEqual(modelNames);
  for (const name of folders) {
    const files = readdirSync(new URL(`${name}/`, import.meta.url)).sort();
    expect(files).toEqual(
      Object.keys(stages)
        .map((stage) => `${stage}.txt`)
        .sort(),
    );
  }
});

/** Twelve digits: a better way to solve for a number may change its last ones. */
function fixedDigits(text: string): string {
  return text.replace(/\b\d+\.\d{8,}(?:e-?\d+)?/g, (number) => String(Number(Number(number).toPrecision(12))));
}

const kept = new WeakMap<CompiledModel, Analysis>();

/** With almost nobody there; without hash and versions, which say nothing of the analysis. */
function analysed(compiled: CompiledModel): Analysis {
  const found = kept.get(compiled) ?? analyseModel(compiled, { at: 'zero', wantEigenvalues: true }).value;
  if (found === null) throw new Error('Every model has a matrix near zero.');
  const told = { ...found };
  delete told.hash;
  delete told.tool;
  kept.set(compiled, told);
  return told;
}

/** Digits that no machine and no change in the order of sums moves. */
function rounded(_key: string, value: unknown): unknown {
  if (typeof value !== 'number') return value;
  return Math.abs(value) < 1e-10 ? 0 : Number(value.toPrecision(7));
}
