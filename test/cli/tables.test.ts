// What --out writes is read back by a database: types, units, and nulls for what is missing.
import { DuckDBInstance, type DuckDBConnection } from '@duckdb/node-api';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { csvParse } from 'd3';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { withoutScripts } from '../page/without-scripts.ts';
import { filesIn, folder, hare, skein } from './skein.ts';

let database: DuckDBConnection;
beforeAll(async () => {
  database = await (await DuckDBInstance.create(':memory:')).connect();
});
afterAll(() => {
  database.closeSync();
});

type Row = Readonly<Record<string, unknown>>;

async function query(sql: string): Promise<readonly Row[]> {
  return (await database.runAndReadAll(sql)).getRowObjects();
}

const duckTypes: Readonly<Record<string, string>> = { text: 'VARCHAR', integer: 'INTEGER', number: 'DOUBLE' };

const calls = [
  ['run', hare, '--replicates', '50', '--years', '7', '--seed', '3'],
  ['path', hare, '--years', '4'],
  ['analyse', hare],
  // Without positions, without parameters that have a source, without a threshold that is fallen below.
  ['run', 'models/ageing-only.yaml', '--replicates', '20'],
  // With the author's own counts, some of them missing.
  ['run', 'models/held-against-counts.yaml', '--replicates', '20'],
  ['compare', 'models/borrowed-newts.yaml', '--replicates', '40', '--years', '10'],
];

describe.each(calls)('skein %s %s --out', (...words) => {
  function out(): string {
    const cwd = folder();
    const { code, err } = skein([...words, '--quiet', '--out', 'out'], { cwd });
    expect(err).toBe('');
    expect(code).toBe(0);
    return join(cwd, 'out');
  }

  test('has Parquet with the types of the dictionary and the cells of the CSV', async () => {
    const path = out();
    const dictionary = csvParse(readFileSync(join(path, 'dictionary.csv'), 'utf8'));
    const tables = filesIn(path).filter((name) => name.endsWith('.parquet'));
    expect(tables.length).toBeGreaterThan(0);
    for (const file of tables) {
      const name = file.replace('.parquet', '');
      const parquet = `'${join(path, file)}'`;
      const own = dictionary.filter((row) => row['table'] === name);
      const described = await query(`DESCRIBE SELECT * FROM ${parquet}`);
      expect(described.map((row) => [row['column_name'], row['column_type']])).toEqual(
        own.map((row) => [row['column'], duckTypes[row['type'] ?? '']]),
      );
      const csv = csvParse(readFileSync(join(path, `${name}.csv`), 'utf8'));
      const rows = await query(`SELECT * FROM ${parquet}`);
      const cell = (value: unknown): string => (value === null ? '' : String(value));
      expect(rows.map((row) => Object.values(row).map(cell))).toEqual(csv.map((row) => csv.columns.map((c) => row[c])));
      const inside = await query(`SELECT decode(value) AS text FROM parquet_kv_metadata(${parquet})
        WHERE decode(key) = 'skein-dictionary'`);
      expect(JSON.parse(String(inside[0]?.['text']))).toEqual(
        own.map(({ column, type, unit, meaning }) => ({ column, type, unit, meaning })),
      );
    }
  });
});

describe('what is missing', () => {
  test('is null and never zero', async () => {
    const cwd = folder();
    const words = ['run', 'models/ageing-only.yaml', '--replicates', '20', '--years', '8', '--out', 'out'];
    expect(skein(words, { cwd }).code).toBe(0);
    const whole = await query(`SELECT * FROM '${cwd}/out/abundance.parquet' WHERE patch IS NULL`);
    expect(whole).toHaveLength(9);
    expect(whole.every((row) => row['empty'] === null)).toBe(true);
    // Everybody is gone after eight years: a true zero stays one.
    expect(whole.at(-1)?.['mean']).toBe(0);
    const [patch] = await query(`SELECT * FROM '${cwd}/out/patches.parquet'`);
    expect(patch).toMatchObject({ x: null, y: null, capacity: null });
    const empty = await query(`SELECT empty FROM '${cwd}/out/abundance.parquet' WHERE patch IS NOT NULL ORDER BY year`);
    expect(empty[0]?.['empty']).toBe(0);
    expect(empty.at(-1)?.['empty']).toBe(1);
  });

  test('a single run has no spread: nothing is said of it, rather than 0', async () => {
    const cwd = folder();
    const { out } = skein(['run', hare, '--replicates', '1', '--years', '2', '--out', 'out'], { cwd });
    expect(out).toMatch(/mean lowest count: [\d,]+ females\n/);
    const rows = await query(`SELECT sd, mean FROM '${cwd}/out/abundance.parquet'`);
    expect(rows.every((row) => row['sd'] === null && row['mean'] !== null)).toBe(true);
    const results: unknown = JSON.parse(readFileSync(join(cwd, 'out/results.json'), 'utf8'));
    expect(results).toMatchObject({ meanLowestCount: { sd: null, standardError: null } });
    const page = skein(['report', hare, '--replicates', '1', '--years', '2', '-o', '-'], { cwd }).out;
    const shown = withoutScripts(page);
    expect(shown.match(/NaN|give or take/g)).toBe(null);
  });

  test('and numbers with a unit have it in the dictionary', () => {
    const cwd = folder();
    skein(['run', hare, '--replicates', '20', '--years', '3', '--out', 'out'], { cwd });
    const rows = csvParse(readFileSync(join(cwd, 'out/dictionary.csv'), 'utf8'));
    expect(rows.filter((row) => row['type'] !== 'text' && row['unit'] === '')).toEqual([]);
    const unit = (table: string, column: string) =>
      rows.find((row) => row['table'] === table && row['column'] === column)?.['unit'];
    expect(unit('patches', 'area')).toBe('km2');
    expect(unit('abundance', 'quantile_0.5')).toBe('animals');
    expect(unit('chances_by_year', 'ever')).toBe('share');
    expect(unit('abundance', 'year')).toBe('year');
  });
});
