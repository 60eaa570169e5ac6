// What is left of a spec with mistakes of shape when they are cut out: enough to look for wrong names in the same round.
import { CoreSchema, namedSchemas } from '../schema/spec.ts';
import type { SourceEntry, SourceMap, SourceNode, SourceText } from '../text/source.ts';
import { checkShape } from './check.ts';
import { trial, type Report } from './report.ts';
import { branchesOf, isSeveral, knownKeys, shapeOfKey, sortOf, type Shape } from './shape.ts';
import { checkTop } from './top.ts';

export interface Sound {
  /** Without a mistake of shape. */
  readonly root: SourceMap;
  /** Every word that was cut out: a name that is missing now may have stood there. */
  readonly lost: ReadonlySet<string>;
}

const core: Shape = CoreSchema;
const kinds: Readonly<Record<string, Shape>> = namedSchemas;

/** Null where too little is left to know which names there are. */
export function soundPart(root: SourceMap, source: SourceText, report: Report): Sound | null {
  const cutter = new Cutter(report);
  const entries = root.entries.flatMap((entry) => cutter.top(entry));
  const sound = { ...root, entries: [...entries, ...standIns(entries, source)] };
  const left = trial(report);
  checkTop(sound, left);
  return left.found.errors > 0 ? null : { root: sound, lost: cutter.lost };
}

/** Keys that every spec needs and that no name stands in. */
const nameless: Readonly<Record<string, string | number>> = {
  skein: 1,
  years: 1,
  counts: 'females',
};

function standIns(entries: readonly SourceEntry[], { text }: SourceText): readonly SourceEntry[] {
  const span = { offset: text.length, length: 0 };
  const scalar = (value: string | number): SourceNode => ({
    kind: 'scalar',
    value,
    source: String(value),
    plain: true,
    span,
  });
  const entry = (key: string, value: SourceNode): SourceEntry => ({ key, keySpan: span, plain: true, value });
  const section = (key: string, value: SourceNode): SourceNode => ({ kind: 'map', entries: [entry(key, value)], span });
  const all = [
    ...Object.entries(nameless).map(([key, value]) => entry(key, scalar(value))),
    entry('study', section('title', scalar('what can be read'))),
    entry('start', section('total', scalar(1))),
  ];
  return all.filter(({ key }) => !entries.some((one) => one.key === key));
}

class Cutter {
  readonly lost = new Set<string>();
  readonly #report: Report;

  constructor(report: Report) {
    this.#report = report;
  }

  top(entry: SourceEntry): readonly SourceEntry[] {
    const shape = Object.hasOwn(knownKeys(core), entry.key) ? knownKeys(core)[entry.key] : kinds[kindOf(entry.value)];
    return this.#entry(entry, shape);
  }

  #entry(entry: SourceEntry, shape: Shape | undefined): readonly SourceEntry[] {
    const value = shape === undefined ? null : this.#cut(entry.value, shape);
    if (value !== null) return [value === entry.value ? entry : { ...entry, value }];
    this.lost.add(entry.key);
    this.#lose(entry.value);
    return [];
  }

  /** The part of a value that fits its shape; null where none does. */
  #cut(node: SourceNode, shape: Shape): SourceNode | null {
    if (node.kind === 'hole') return null;
    if (this.#fits(node, shape)) return node;
    for (const branch of branchesOf(shape)) {
      const cut = this.#cutAs(node, branch);
      if (cut !== null && this.#fits(cut, shape)) return cut;
    }
    return null;
  }

  #cutAs(node: SourceNode, shape: Shape): SourceNode | null {
    if (node.kind === 'map' && sortOf(shape) === 'map') {
      const entries = node.entries.flatMap((entry) => this.#entry(entry, shapeOfKey(shape, entry.key)));
      return { ...node, entries };
    }
    const { items } = shape;
    if (node.kind !== 'list' || sortOf(shape) !== 'list' || items === undefined || isSeveral(items)) return null;
    const kept = node.items.flatMap((item) => {
      const cut = this.#cut(item, items);
      if (cut === null) this.#lose(item);
      return cut ?? [];
    });
    return { ...node, items: kept };
  }

  #fits(node: SourceNode, shape: Shape): boolean {
    const own = trial(this.#report);
    checkShape(node, shape, { label: '', span: node.span }, own);
    return own.found.errors === 0 && !hasHole(node);
  }

  #lose(node: SourceNode): void {
    if (node.kind === 'scalar') this.lost.add(node.source);
    if (node.kind === 'list') for (const item of node.items) this.#lose(item);
    if (node.kind !== 'map') return;
    for (const { key, value } of node.entries) {
      this.lost.add(key);
      this.#lose(value);
    }
  }
}

function hasHole(node: SourceNode): boolean {
  if (node.kind === 'hole') return true;
  if (node.kind === 'list') return node.items.some(hasHole);
  return node.kind === 'map' && node.entries.some(({ value }) => hasHole(value));
}

function kindOf(section: SourceNode): string {
  const kind = section.kind === 'map' ? section.entries.find(({ key }) => key === 'kind')?.value : undefined;
  return kind?.kind === 'scalar' ? kind.source : '';
}
