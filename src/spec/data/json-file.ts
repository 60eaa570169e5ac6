// A named file as JSON.
import { put, type Report } from '../shape/report.ts';
import type { SourceNode, SourceScalar } from '../text/source.ts';
import { readJson } from './json.ts';
import type { FileReader } from './reader.ts';

interface JsonFile {
  readonly root: SourceNode;
  /** Where mistakes in the file are put. */
  readonly report: Report;
}

export function readJsonFile(name: SourceScalar, reader: FileReader): JsonFile | undefined {
  const report = reader.open(name);
  if (report === undefined) return undefined;
  const read = readJson(report.source);
  if (read.ok) return { root: read.root, report };
  const { offset, message } = read.mistake;
  put(report, { code: 'data-syntax', message, span: { offset, length: 1 } }, { expected: 'JSON (RFC 8259)' });
  return undefined;
}
