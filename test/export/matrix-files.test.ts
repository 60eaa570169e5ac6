// The matrix as files says what the matrix is.
import { csvParse } from 'd3';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { buildBlock } from '../../src/compile/block.ts';
import { forEachEntry } from '../../src/numeric/sparse.ts';
import { folder, skein } from '../cli/skein.ts';
import { compileModel, modelNames } from '../golden/models.ts';
import { matrixMarket, matrixRows } from '../../src/export/matrix-files.ts';

describe.each(modelNames)('%s', (name) => {
  const block = buildBlock(compileModel(name), 'zero');
  const entries: (readonly [number, number, number])[] = [];
  forEachEntry(block.matrix, (to, from, value) => entries.push([to + 1, from + 1, value]));

  test('as Matrix Market', () => {
    const lines = matrixMarket(block, 'a\ntitle').trimEnd().split('\n');
    expect(lines[0]).toBe('%%MatrixMarket matrix coordinate real general');
    const [size, ...data] = lines.filter((line) => !line.startsWith('%'));
    expect(size).toBe(`${block.states.length} ${block.states.length} ${entries.length}`);
    expect(data.map((line) => line.split(' ').map(Number))).toEqual(entries);
  });

  test('as rows', () => {
    expect(matrixRows(block).map(([to, from, , , , , value]) => [to, from, value])).toEqual(entries);
    const [first] = matrixRows(block);
    const { patch, class: own } = block.states[Number(first?.[0]) - 1]!;
    expect(first?.slice(2, 4)).toEqual([block.patches[patch], block.classes[own]]);
  });
});

describe('skein compile', () => {
  test('writes what the end of the name says', () => {
    const cwd = folder();
    for (const ending of ['mtx', 'csv', 'json', 'wasm']) {
      const { code, err } = skein(['compile', 'models/two-ponds.yaml', '-o', `m.${ending}`], { cwd });
      expect([code, err]).toEqual([0, `Wrote m.${ending}\n`]);
    }
    const read = (ending: string) => readFileSync(join(cwd, `m.${ending}`), 'utf8');
    const json = JSON.parse(read('json')) as { readonly entries: readonly { readonly value: number }[] };
    const values = json.entries.map(({ value }) => value);
    expect(csvParse(read('csv')).map((row) => Number(row['value']))).toEqual(values);
    const market = read('mtx')
      .split('\n')
      .slice(-1 - values.length, -1);
    expect(market.map((line) => Number(line.split(' ')[2]))).toEqual(values);
    const shown = skein(['show', 'models/two-ponds.yaml', 'matrix', '--json'], { cwd }).out;
    expect(read('json')).toBe(shown);
  });

  test.each(['m', 'm.txt', 'm.mtx.gz'])('refuses %s', (name) => {
    const { code, err } = skein(['compile', 'models/two-ponds.yaml', '-o', name], { cwd: folder() });
    expect(code).toBe(2);
    expect(err).toBe(`-o ${name}: the name of the file ends in .mtx, .csv, .json, .wasm.\n`);
  });
});
