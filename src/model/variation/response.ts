// Which rates are expressions over parameters that vary or over drivers whose years are drawn, and what they are made of.
import type { Ast } from '../../spec/expression/ast.ts';
import { namesIn } from '../../spec/expression/names.ts';
import { printExpression } from '../../spec/expression/print.ts';
import type { SpecPath } from '../../spec/document.ts';
import type { PatchNumbers, Response, ScaledPart, Varied, Variation } from '../chance.ts';
import type { Context } from '../context.ts';
import type { Phase } from '../model.ts';
import { patchNumbers } from './patch-numbers.ts';
import { refuseOutOfBounds } from './response-bounds.ts';
import { refuseElsewhere, refuseTwice } from './response-places.ts';
import { rateWords, tableOf } from './rate-name.ts';
import { whereIn } from '../rates.ts';

const parts: readonly ScaledPart[] = ['survival', 'births', 'leaving'];

export type Responses = Pick<Variation, 'responses' | 'attributes' | 'dated'>;

/** One response for each rate and each way it is written. */
export function resolveResponses(context: Context, phases: readonly Phase[], varied: readonly Varied[]): Responses {
  const parameters = varied.filter((one) => one.of.kind === 'parameter').map((one) => one.name);
  const changing = new Set([...parameters, ...(context.drivers.resampled?.names ?? [])]);
  if (changing.size === 0) return { responses: [], attributes: new Map(), dated: new Map() };
  const places = new Set<string>();
  const responses = phases.flatMap((phase, index) =>
    parts.flatMap((part) => responsesOf(context, { phase, index, part, changing, places })),
  );
  refuseElsewhere(context, changing, places);
  for (const response of responses) refuseOutOfBounds(context, { response, phases, varied });
  refuseTwice(context, responses, varied);
  const read = new Set(responses.flatMap((one) => namesIn(one.expression)));
  const attributes = new Map<string, Float64Array>();
  const dated = new Map<string, Float64Array>();
  const { firstYear, steps } = context.time;
  for (const name of read) {
    if (changing.has(name) || name === 'year') continue;
    const driver = context.drivers.dated.get(name);
    if (driver !== undefined)
      dated.set(
        name,
        Float64Array.from({ length: steps }, (_, t) => driver(firstYear + t)),
      );
    else
      attributes.set(
        name,
        Float64Array.from(
          context.patches,
          (_, p) => context.numbers.attribute(name, whereIn(context, p, firstYear)) ?? 0,
        ),
      );
  }
  return { responses, attributes, dated };
}

interface Request {
  readonly phase: Phase;
  readonly index: number;
  readonly part: ScaledPart;
  /** Names of what changes by chance from year to year. */
  readonly changing: ReadonlySet<string>;
  /** Where expressions stand that are worked out anew every year. */
  readonly places: Set<string>;
}

function responsesOf(context: Context, { phase, index, part, changing, places }: Request): readonly Response[] {
  const written = tableOf(phase, part)?.written;
  if (written === undefined || phase.kind === 'demography') return [];
  const classes = context.classes.length;
  return context.classes.flatMap((_, c) => {
    const groups = new Map<string, { expression: Ast; text: string; path: SpecPath; patches: number[] }>();
    context.patches.forEach((_patch, p) => {
      const own = written[p * classes + c] ?? null;
      if (own === null) return;
      const expression = context.numbers.expanded(own.expression, own.path, {
        keep: changing,
        attributes: context.attributes[p],
      });
      if (expression === null || !namesIn(expression).some((name) => changing.has(name))) return;
      places.add(own.path.join('\0'));
      // Attributes that are expressions may make one text another expression in another patch.
      const key = printExpression(expression);
      const group = groups.get(key) ?? { expression, text: String(own.expression), path: own.path, patches: [] };
      group.patches.push(p);
      groups.set(key, group);
    });
    const name = rateWords(context, phase.name === 'breeding' ? 'births' : phase.name, c);
    return [...groups.values()].map((group): Response => {
      const base = baseOf(context, group);
      const bounds = part === 'births' ? 'from zero' : 'share';
      return { phase: index, part, class: c, name, expression: group.expression, patches: group.patches, base, bounds };
    });
  });
}

interface Group {
  readonly text: string;
  readonly path: SpecPath;
  readonly patches: readonly number[];
}

function baseOf(context: Context, { text, path, patches }: Group): PatchNumbers {
  const inside = new Set(patches);
  const varies = context.numbers.varies(text, path);
  return patchNumbers(context, varies, (p, year) =>
    inside.has(p) ? context.numbers.value(text, path, whereIn(context, p, year)) : 0,
  );
}
