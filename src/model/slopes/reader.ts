// Exact slopes of the numbers of a spec by one named parameter, and which places were asked for them.
import type { SpecPath } from '../../spec/document.ts';
import type { Dimension } from '../../spec/quantity.ts';
import type { Context } from '../context.ts';
import type { RateTable } from '../model.ts';
import { whereIn } from '../rates.ts';

type Expression = number | string | undefined;

export class SlopeReader {
  readonly context: Context;
  readonly #parameter: string;
  readonly #asked = new Set<string>();

  constructor(context: Context, parameter: string) {
    this.context = context;
    this.#parameter = parameter;
  }

  /** Of a number of the whole model, in the first year. */
  one(expression: Expression, path: SpecPath, dimension?: Dimension): number {
    const where = { year: this.context.time.firstYear, ...(dimension === undefined ? {} : { dimension }) };
    return this.#slope(expression, path, where);
  }

  /** Of a number of a patch, in the first year. */
  inPatch(expression: Expression, path: SpecPath, patch: number): number {
    return this.#slope(expression, path, whereIn(this.context, patch, this.context.time.firstYear));
  }

  /** Of the same expression in every patch. */
  byPatch(expression: Expression, path: SpecPath): Float64Array {
    return Float64Array.from(this.context.patches, (_, p) => this.inPatch(expression, path, p));
  }

  /** Of the numbers of a table, in its first year. */
  table({ epochs, written }: RateTable): RateTable {
    const size = epochs[0]?.length ?? 0;
    const slopes = new Float64Array(size);
    const inOnePatch = size / this.context.patches.length;
    written?.forEach((own, i) => {
      if (own !== null) slopes[i] = this.inPatch(own.expression, own.path, Math.floor(i / inOnePatch));
    });
    return { epochs: [slopes], epochOf: new Int32Array(0) };
  }

  /** Places that use the parameter and that nobody asked for: what they do to the model is not in the slopes. */
  missed(): readonly SpecPath[] {
    return this.context.numbers.uses().flatMap((use) => {
      const { path } = use;
      const known = this.#asked.has(path.join('\0')) || standsOutside(path);
      return known || !this.context.numbers.behind(use).includes(this.#parameter) ? [] : [path];
    });
  }

  #slope(expression: Expression, path: SpecPath, where: Parameters<Context['numbers']['slope']>[2]): number {
    if (expression === undefined) return 0;
    this.#asked.add(path.join('\0'));
    return this.context.numbers.slope(expression, path, where, this.#parameter);
  }
}

/** Numbers that do not stand in the matrix: those of other sections, and how the young of one animal vary. */
function standsOutside(path: SpecPath): boolean {
  return withoutMatrix.has(String(path[0])) || (path.includes('offspring') && !path.includes('chances'));
}

/** Keys of the spec. */
const withoutMatrix: ReadonlySet<string> = new Set(['parameters', 'start', 'outcomes', 'run', 'variation']);
