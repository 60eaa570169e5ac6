// What the kernel follows to make and to solve matrices of one pattern: whole numbers for where everything stands, and the numbers
// that are the same in all of them.
import { planElimination, type Elimination } from '../numeric/elimination.ts';

/** How numbers that move make the entries of a matrix: numbers on a tape, each made from earlier ones. */
export interface AlikeMatrices {
  readonly order: number;
  /** How many numbers move. */
  readonly sources: number;
  /** What stands on the tape before anything moves. */
  readonly start: Float64Array;
  /** The number at `at` is constant + slope times what moves. */
  readonly moving: readonly {
    readonly at: number;
    readonly constant: number;
    readonly slope: number;
    readonly source: number;
  }[];
  /** In the order in which they can be made: the number at `target` is a sum of products of two others. */
  readonly sums: readonly {
    readonly target: number;
    readonly products: readonly (readonly [left: number, right: number])[];
  }[];
  /** All entries that are not always 0, each once, and where on the tape they stand. */
  readonly entries: readonly { readonly row: number; readonly column: number; readonly place: number }[];
}

/** Positive vectors of a matrix that resembles all of them, `order` numbers each. */
export interface StartVectors {
  readonly right: Float64Array;
  readonly left: Float64Array;
}

export interface AlikeProgram {
  readonly words: Int32Array<ArrayBuffer>;
  readonly numbers: Float64Array<ArrayBuffer>;
}

/** Bytes of a number of eight matrices side by side, as `assembly/alike/room.ts` has them. */
const row = 64;
const headerWords = 10;
/** Beyond it a program takes more memory than the matrices are worth. */
const mostMultiplications = 1 << 21;

/** Null where elimination costs too much, however it is ordered. */
export function alikeProgram(matrices: AlikeMatrices, start: StartVectors): AlikeProgram | null {
  const { order, entries } = matrices;
  const elimination = planElimination(
    order,
    entries.map(({ row: i, column: j }): readonly [number, number] => [i, j]),
    mostMultiplications,
  );
  if (elimination === null) return null;
  const placed = placedEntries(matrices, elimination);
  const slots = slotsOf(elimination);
  // One more place, which is 0, for what fills in.
  const nothing = matrices.start.length;
  const parts = [
    movingPart(matrices),
    sumsPart(matrices),
    entriesPart(placed),
    loadsPart(elimination, placed, nothing),
    eliminationPart(elimination, slots),
  ];
  const starts = parts.reduce<readonly number[]>(
    (all, part) => [...all, (all.at(-1) ?? 0) + part.length],
    [headerWords],
  );
  const header = [order, nothing + 1, slots.count, matrices.sources, ...starts.map((words) => 4 * words)];
  const rows = rowsPart(elimination, slots, starts.at(-1) ?? 0);
  return {
    words: Int32Array.from([header, ...parts, rows].flat()),
    numbers: Float64Array.from(
      [[...matrices.start, 0], linesOf(matrices), weightsOf(placed, elimination, start)].flat(),
    ),
  };
}

/** By place in the order of elimination. */
type Placed = readonly (readonly { readonly column: number; readonly place: number }[])[];

function placedEntries({ order, entries }: AlikeMatrices, elimination: Elimination): Placed {
  const at = new Int32Array(order);
  elimination.order.forEach((state, i) => (at[state] = i));
  const placed = Array.from({ length: order }, (): { column: number; place: number }[] => []);
  for (const { row: i, column, place } of entries) placed[at[i] ?? 0]?.push({ column: at[column] ?? 0, place });
  return placed.map((own) => own.sort((a, b) => a.column - b.column));
}

interface Slots {
  readonly count: number;
  readonly first: readonly number[];
  readonly diagonal: readonly number[];
  /** Of (row, column), where there is one. */
  at(row: number, column: number): number;
}

function columnsOf({ below, above }: Elimination, i: number): readonly number[] {
  return [...(below[i] ?? []), i, ...(above[i] ?? [])];
}

function slotsOf(elimination: Elimination): Slots {
  const [first, diagonal]: [number[], number[]] = [[], []];
  const byRow: ReadonlyMap<number, number>[] = [];
  let count = 0;
  for (const i of elimination.order.keys()) {
    const columns = columnsOf(elimination, i);
    const start = count;
    byRow.push(new Map(columns.map((column, k) => [column, start + k])));
    first.push(start);
    diagonal.push(start + (elimination.below[i]?.length ?? 0));
    count += columns.length;
  }
  return { count, first, diagonal, at: (i, j) => byRow[i]?.get(j) ?? -1 };
}

function movingPart({ moving }: AlikeMatrices): readonly number[] {
  return [moving.length, ...moving.flatMap(({ at, source }) => [row * at, source])];
}

function linesOf({ moving }: AlikeMatrices): readonly number[] {
  return moving.flatMap(({ constant, slope }) => [constant, slope]);
}

function sumsPart({ sums }: AlikeMatrices): readonly number[] {
  const own = sums.flatMap(({ target, products }) => [
    row * target,
    products.length,
    ...products.flatMap(([left, right]) => [row * left, row * right]),
  ]);
  return [sums.length, ...own];
}

function entriesPart(placed: Placed): readonly number[] {
  const count = placed.reduce((sum, own) => sum + own.length, 0);
  return [count, ...placed.flatMap((own) => [own.length, ...own.map(({ place }) => row * place)])];
}

/** What the vectors to start from say of each entry, of each row, and they themselves. */
function weightsOf(placed: Placed, { order }: Elimination, start: StartVectors): readonly number[] {
  const [right, left] = [start.right, start.left].map((all) => Array.from(order, (state) => all[state] ?? 0));
  const [x = [], y = []] = [right, left];
  const product = x.reduce((sum, value, i) => sum + value * (y[i] ?? 0), 0);
  const ofEntries = placed.flatMap((own, i) => own.map(({ column }) => (x[column] ?? 0) / (x[i] ?? 1)));
  const ofRows = x.map((value, i) => (value * (y[i] ?? 0)) / product);
  return [...ofEntries, ...ofRows, ...x, ...y];
}

function loadsPart(elimination: Elimination, placed: Placed, nothing: number): readonly number[] {
  const loads = placed.flatMap((own, i) => {
    const places = new Map(own.map(({ column, place }) => [column, place]));
    return columnsOf(elimination, i).map((column) => row * (places.get(column) ?? nothing));
  });
  return [loads.length, ...loads];
}

/** Of each row its first slot, its diagonal, how many below it; of each of those its pivot, what is taken, how often, and from where. */
function eliminationPart({ below, above }: Elimination, slots: Slots): readonly number[] {
  return below.flatMap((own, i) => [
    row * (slots.first[i] ?? 0),
    row * (slots.diagonal[i] ?? 0),
    own.length,
    ...Array.from(own).flatMap((k) => {
      const taken = above[k] ?? new Int32Array(0);
      const source = (slots.diagonal[k] ?? 0) + 1;
      return [row * k, row * source, taken.length, ...Array.from(taken, (column) => row * slots.at(i, column))];
    }),
  ]);
}

/** Of each row its first slot, its diagonal, how many entries below and above it, and where in the program their columns stand. */
function rowsPart({ below, above }: Elimination, slots: Slots, firstWord: number): readonly number[] {
  let columnsFrom = firstWord + 5 * below.length;
  const rows: number[] = [];
  const columns: number[] = [];
  below.forEach((own, i) => {
    const others = above[i] ?? new Int32Array(0);
    rows.push(row * (slots.first[i] ?? 0), row * (slots.diagonal[i] ?? 0), own.length, others.length, 4 * columnsFrom);
    columns.push(...Array.from(own, (j) => row * j), ...Array.from(others, (j) => row * j));
    columnsFrom += own.length + others.length;
  });
  return [...rows, ...columns];
}
