// The reference of the language for the README: every key, what it is, its unit and default, and an example.
import { actionSchemas } from './schema/actions.ts';
import { CoreSchema, namedSchemas } from './schema/spec.ts';
import { branchesOf, isSeveral, knownKeys, shapeOfOthers, sortOf, type Shape } from './shape/shape.ts';
import { expectationOf } from './shape/words.ts';

interface Row {
  readonly key: string;
  readonly shape: Shape;
  readonly needed: boolean;
}

/** Markdown: one table of the keys of the language, and one for each kind of section that authors name themselves. */
export function writeReference(): string {
  const core: Shape = CoreSchema;
  const kinds = Object.entries<Shape>(namedSchemas).map(([kind, shape]) => {
    const intro = `### \`kind: ${kind}\`\n\n${shape.description ?? ''}\n`;
    return `${intro}\n${table(rowsOf(shape, ''))}`;
  });
  const actions = Object.entries<Shape>(actionSchemas).map(([kind, shape]) => {
    const intro = `### An action of \`kind: ${kind}\`\n\n${shape.description ?? ''}\n`;
    return `${intro}\n${table(rowsOf(shape, ''))}`;
  });
  return [table(rowsOf(core, '')), ...kinds, ...actions].join('\n');
}

function table(rows: readonly Row[]): string {
  const head = '| key | what it is | takes | unit | if not given | example |\n|---|---|---|---|---|---|\n';
  return head + rows.map((row) => `| ${cellsOf(row).map(escaped).join(' | ')} |\n`).join('');
}

/** All keys below a shape, each with its path; words in capitals stand for names that the author chooses. */
function rowsOf(shape: Shape, path: string): readonly Row[] {
  const branches = branchesOf(shape).filter((branch) => branch['x-brief'] !== true);
  const rows = branches.flatMap((branch) => rowsOfBranch(branch, path));
  const one = branches.filter((branch) => sortOf(branch) === 'map').length === 1;
  return [...new Map(rows.map((row) => [row.key, one ? row : { ...row, needed: false }])).values()];
}

function rowsOfBranch(shape: Shape, path: string): readonly Row[] {
  const { items } = shape;
  if (sortOf(shape) === 'list') return items === undefined || isSeveral(items) ? [] : rowsOf(items, path);
  if (sortOf(shape) !== 'map') return [];
  const known = Object.entries(knownKeys(shape)).flatMap(([key, value]) => {
    return rowsOfKey({ key: path + key, shape: value, needed: shape.required?.includes(key) === true });
  });
  const own = shapeOfOthers(shape);
  const ownKey = `${path}${shape['x-key'] ?? 'NAME'}`;
  return own === undefined ? known : [...known, ...rowsOfKey({ key: ownKey, shape: own, needed: false })];
}

/** A key without a description of its own only leads to those below it. */
function rowsOfKey(row: Row): readonly Row[] {
  const below = rowsOf(row.shape, `${row.key}.`);
  return row.shape.description === undefined ? below : [row, ...below];
}

function cellsOf({ key, shape, needed }: Row): readonly string[] {
  const { description = '', default: usual, examples = [] } = shape;
  const [example] = examples;
  return [
    `\`${key}\``,
    description,
    expectationOf(shape),
    shape['x-unit'] ?? '',
    needed ? '*needed*' : usual === undefined ? '' : `\`${String(usual)}\``,
    example === undefined ? '' : `\`${String(example)}\``,
  ];
}

function escaped(cell: string): string {
  return cell.replaceAll('|', '\\|');
}
