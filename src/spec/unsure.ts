// Numbers of actions with how sure they are, as parameters with names of their own: so that they are drawn, swept, correlated and
// told as any other. The names follow from where the numbers stand.
import { amountAndUnit } from './quantity.ts';
import { CoreSchema, namedSchemas } from './schema/spec.ts';
import { put, type Report } from './shape/report.ts';
import { branchesOf, knownKeys, shapeBelow, type Shape } from './shape/shape.ts';
import type { SourceEntry, SourceMap, SourceNode } from './text/source.ts';

const core: Shape = CoreSchema;
const kinds: Readonly<Record<string, Shape>> = namedSchemas;

/** Nothing is wrong with the shape of the tree. Each value keeps its place in the text. */
export function nameUnsureNumbers(root: SourceMap, report: Report): SourceMap {
  const before = root.entries.find(({ key }) => key === 'parameters');
  const written = before?.value.kind === 'map' ? before.value.entries : [];
  const names = new Names(written, report);
  const entries = root.entries.map((entry): SourceEntry => {
    const { key, value } = entry;
    if (key === 'actions') return { ...entry, value: names.within(value, { shape: knownKeys(core)[key], path: [] }) };
    if (Object.hasOwn(knownKeys(core), key) || value.kind !== 'map') return entry;
    return { ...entry, value: names.within(value, { shape: kinds[kindOf(value)], path: [key] }) };
  });
  if (names.made.length === 0) return root;
  const [keySpan, span] = [before?.keySpan ?? root.span, before?.value.span ?? root.span];
  const value: SourceMap = { kind: 'map', entries: [...written, ...names.made], span };
  const parameters: SourceEntry = { key: 'parameters', plain: true, keySpan, ...before, value };
  if (before === undefined) return { ...root, entries: [...entries, parameters] };
  return { ...root, entries: entries.map((entry) => (entry.key === 'parameters' ? parameters : entry)) };
}

interface Where {
  readonly shape: Shape | undefined;
  readonly path: readonly string[];
}

/** Keys that only group what is below them. */
const groups: ReadonlySet<string> = new Set(['parameters', 'rates', 'quality']);

class Names {
  readonly made: SourceEntry[] = [];
  readonly #taken: Set<string>;
  readonly #report: Report;

  constructor(written: readonly SourceEntry[], report: Report) {
    this.#taken = new Set(written.map(({ key }) => key));
    this.#report = report;
  }

  within(node: SourceNode, { shape, path }: Where): SourceNode {
    if (node.kind !== 'map' || shape === undefined) return node;
    const entries = node.entries.map((entry): SourceEntry => {
      const below = shapeBelow(shape, entry.key);
      const inside = groups.has(entry.key) ? path : [...path, entry.key];
      const unsure = isUnsure(entry.value) && below !== undefined && takesUnsure(below);
      const value = unsure ? this.#named(entry, inside) : this.within(entry.value, { shape: below, path: inside });
      return value === entry.value ? entry : { ...entry, value };
    });
    return entries.every((entry, i) => entry === node.entries[i]) ? node : { ...node, entries };
  }

  /** Puts the number among the parameters, and its name where it stood. */
  #named({ key, keySpan, value: node }: SourceEntry, path: readonly string[]): SourceNode {
    if (node.kind !== 'map') return node;
    const name = nameOf(path);
    if (this.#taken.has(name)) this.#tellTaken(name, { key, keySpan });
    this.#taken.add(name);
    let [unit, span] = ['', node.span];
    const entries = node.entries.map((entry): SourceEntry => {
      if (entry.key !== 'value' || entry.value.kind !== 'scalar') return entry;
      const split = amountOf(entry.value.source);
      [unit, span] = [split.unit, entry.value.span];
      const number = Number(split.amount);
      const value = Number.isFinite(number) ? number : split.amount;
      return { ...entry, value: { ...entry.value, value, source: split.amount } };
    });
    this.made.push({ key: name, keySpan, plain: true, value: { ...node, entries } });
    const text = unit === '' ? name : `${name} ${unit}`;
    return { kind: 'scalar', value: text, source: text, plain: true, span };
  }

  #tellTaken(name: string, { key, keySpan }: Pick<SourceEntry, 'key' | 'keySpan'>): void {
    const message = `\`${key}\` is not exactly known and would be called \`${name}\`, as another number is`;
    const fix = 'Rename the action or the other number.';
    put(this.#report, { code: 'ambiguous-name', message, span: keySpan }, { fix });
  }
}

/** Percent become a share, as in any other number: the standard error beside them is one of a share, and may be in percent, too. */
function amountOf(source: string): ReturnType<typeof amountAndUnit> {
  const split = amountAndUnit(source);
  const share = Number(split.amount) / 100;
  return split.unit === '%' && Number.isFinite(share) ? { amount: String(share), unit: '' } : split;
}

function nameOf(path: readonly string[]): string {
  const name = path.join('_').replaceAll(/[^\p{L}\p{M}\p{N}_]/gu, '_');
  return /^[\p{L}_]/u.test(name) ? name : `_${name}`;
}

function isUnsure(node: SourceNode): boolean {
  return node.kind === 'map' && ['value', 'uncertainty'].every((key) => node.entries.some((one) => one.key === key));
}

function takesUnsure(shape: Shape): boolean {
  return branchesOf(shape).some((branch) => branch['x-unsure'] !== undefined);
}

function kindOf(section: SourceMap): string {
  const kind = section.entries.find(({ key }) => key === 'kind')?.value;
  return kind?.kind === 'scalar' ? kind.source : '';
}
