// The tables that may stand in files, each as the section that would stand in the spec instead.
import { put } from '../shape/report.ts';
import type { SourceEntry, SourceList, SourceMap, SourceNode, SourceScalar } from '../text/source.ts';
import { Section } from './section.ts';
import { columnsOf, type Table } from './table.ts';

/** `patch, class`, and a column a rate: what would stand under `in`. */
export function ratesSection(table: Table): SourceMap | undefined {
  return byTwoKeys(table, ['patch', 'class'], (section, [patch, name], { cell, column }) => {
    section.put([patch, column, name], cell);
  });
}

/** `patch`, and a column a class. */
export function classesSection(table: Table): SourceMap | undefined {
  return byOneKey(table, 'patch', (section, patch, { cell, column }) => section.put([patch, column], cell));
}

/** `year`, and a column a driver. */
export function driversSection(table: Table): SourceMap | undefined {
  return byOneKey(table, 'year', (section, year, { cell, column }) => section.put([column, year], cell));
}

/** One row a value: its keys in columns of their own, and the value in the last. */
export function longSection(table: Table, columns: readonly string[]): SourceMap | undefined {
  const at = columnsOf(table, { needed: columns, others: [] });
  if (at === undefined) return undefined;
  const section = new Section(table.report);
  for (const row of table.rows) {
    const cells = at.map((i) => row[i]).filter((cell) => cell !== undefined);
    const value = cells.at(-1);
    if (value !== undefined) section.put(cells.slice(0, -1), value);
  }
  return section.node();
}

interface Filled {
  readonly cell: SourceScalar;
  /** The head of its column. */
  readonly column: SourceScalar;
}

function byOneKey(
  table: Table,
  name: string,
  add: (section: Section, key: SourceScalar, filled: Filled) => void,
): SourceMap | undefined {
  const [at] = columnsOf(table, { needed: [name] }) ?? [];
  if (at === undefined) return undefined;
  const section = new Section(table.report);
  for (const row of table.rows) {
    const key = row[at];
    row.forEach((cell, i) => {
      const column = table.header[i];
      if (i !== at && key !== undefined && column !== undefined) add(section, key, { cell, column });
    });
  }
  return section.node();
}

function byTwoKeys(
  table: Table,
  names: readonly [string, string],
  add: (section: Section, keys: readonly [SourceScalar, SourceScalar], filled: Filled) => void,
): SourceMap | undefined {
  const [first, second] = columnsOf(table, { needed: names }) ?? [];
  if (first === undefined || second === undefined) return undefined;
  const section = new Section(table.report);
  for (const row of table.rows) {
    const [a, b] = [row[first], row[second]];
    row.forEach((cell, i) => {
      const column = table.header[i];
      if (i === first || i === second || a === undefined || b === undefined || column === undefined) return;
      add(section, [a, b], { cell, column });
    });
  }
  return section.node();
}

/** The first line and the first column name the classes, in their order: columns are from, rows are to. */
export function matrixRows(table: Table, classes: readonly string[]): SourceList | undefined {
  const { header, rows, report } = table;
  const [corner, ...from] = header;
  const to = rows.flatMap((row) => row[0] ?? []);
  const wrong = firstDifference(from, classes) ?? firstDifference(to, classes);
  if (wrong !== undefined || corner === undefined) {
    const cell = wrong?.cell ?? corner;
    put(
      report,
      {
        code: 'csv-column',
        message: 'The matrix does not name the classes in their order',
        span: cell?.span ?? { offset: 0, length: 1 },
      },
      {
        found: cell?.source === '' ? undefined : cell?.source,
        expected: `${classes.join(', ')}, in the first line and down the first column`,
        reason: 'Columns are from, rows are to; names keep a matrix from being read the wrong way round.',
      },
    );
    return undefined;
  }
  const items = rows.map((row): SourceNode => {
    const cells = row.slice(1).map((cell) => (cell.source === '' ? { ...cell, value: 0, source: '0' } : cell));
    return { kind: 'list', items: cells, span: row[0]?.span ?? corner.span };
  });
  return { kind: 'list', items, span: corner.span, file: report.source };
}

/** A column a number, a row a point; an empty cell is not said. */
export function pointsList({ header, rows, report }: Table): SourceList {
  const span = header[0]?.span ?? { offset: 0, length: 1 };
  const items = rows.map((row): SourceNode => {
    const entries = row.flatMap((value, i): SourceEntry[] => {
      const name = header[i];
      return name === undefined || value.source === ''
        ? []
        : [{ key: name.source, keySpan: name.span, plain: true, value }];
    });
    return { kind: 'map', entries, span: row[0]?.span ?? span };
  });
  return { kind: 'list', items, span, file: report.source };
}

function firstDifference(
  cells: readonly SourceScalar[],
  classes: readonly string[],
): { readonly cell: SourceScalar | undefined } | undefined {
  const at = classes.findIndex((name, i) => cells[i]?.source !== name);
  if (at >= 0) return { cell: cells[at] ?? cells.at(-1) };
  return cells.length > classes.length ? { cell: cells[classes.length] } : undefined;
}
