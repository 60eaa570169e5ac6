// Tidy tables: one row an observation, each column with its unit and meaning in the dictionary.

export type Cell = string | number | null;

type ColumnType = 'text' | 'integer' | 'number';

export interface Column {
  readonly name: string;
  readonly unit: string;
  readonly meaning: string;
  /** Where it is not said: text without a unit, an integer for a year, a number with any other unit. */
  readonly type?: ColumnType;
}

export interface Table {
  readonly name: string;
  readonly columns: readonly Column[];
  readonly rows: readonly (readonly Cell[])[];
}

export const noUnknownColumn: Column = {
  name: 'no_unknown',
  unit: '',
  meaning:
    'Why there is no interval from what is not known although it was drawn: `too few draws` (fewer than 39), `nothing unknown` (no such number enters), `within the noise` (the draws differ by no more than their numbers of runs explain).',
};

export function typeOf({ type, unit }: Column): ColumnType {
  return type ?? (unit === '' ? 'text' : unit === 'year' ? 'integer' : 'number');
}

/** RFC 4180, with a line feed; what is missing is empty. */
export function csvText({ columns, rows }: Pick<Table, 'columns' | 'rows'>): string {
  return rowsText([columns.map((column) => column.name), ...rows]);
}

/** The same without the line of names. */
export function rowsText(rows: Table['rows']): string {
  let text = '';
  for (const row of rows) text += `${row.map(csvCell).join(',')}\n`;
  return text;
}

export function dictionaryText(tables: readonly Table[]): string {
  const names = ['table', 'column', 'type', 'unit', 'meaning'].map((name) => ({ name, unit: '', meaning: '' }));
  const rows = tables.flatMap((table) =>
    table.columns.map((column) => [table.name, column.name, typeOf(column), column.unit, column.meaning]),
  );
  return csvText({ columns: names, rows });
}

/** What is not known, or is no number, such as a mean over no run. */
export function isMissing(cell: Cell): cell is null {
  return cell === null || (typeof cell === 'number' && !Number.isFinite(cell));
}

export function csvCell(cell: Cell): string {
  if (isMissing(cell)) return '';
  if (typeof cell === 'number') return String(cell);
  return /[",\n\r]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell;
}
