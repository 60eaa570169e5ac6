// A program that knows the published schema and nothing else of the language, as an editor does.
import { Ajv2020, type ValidateFunction } from 'ajv/dist/2020.js';
import { writeSchema } from '../../src/spec/publish.ts';

const formats = [
  'name',
  'identifier',
  'expression',
  'length',
  'area',
  'share',
  'per-length',
  'time',
  'file',
  'chance',
  'year',
];

export function publishedValidator(): ValidateFunction {
  const ajv = new Ajv2020({ strict: true, allErrors: true, allowUnionTypes: true, strictRequired: false });
  ajv.addVocabulary(['x-unit', 'x-key']);
  for (const format of formats) ajv.addFormat(format, true);
  const published: object = JSON.parse(writeSchema());
  return ajv.compile(published);
}
