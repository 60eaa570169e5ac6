// Which rates are expressions over parameters that vary, and what they are made of.
import { pinned } from '../../machine/pinned.ts';
import type { Ast } from '../../spec/expression/ast.ts';
import { evaluate } from '../../spec/expression/evaluate.ts';
import { namesIn } from '../../spec/expression/names.ts';
import type { SpecPath } from '../../spec/document.ts';
import type { PatchNumbers, Response, ScaledPart, Varied } from '../chance.ts';
import { fail, type Context } from '../context.ts';
import type { Phase } from '../model.ts';
import { distributionOf, numberAt } from './distribution.ts';
import { patchNumbers } from './patch-numbers.ts';
import { rateWords, tableOf } from './rate-name.ts';
import { whereIn } from '../rates.ts';

const parts: readonly ScaledPart[] = ['survival', 'births', 'leaving'];

export interface Responses {
  readonly responses: readonly Response[];
  readonly attributes: ReadonlyMap<string, Float64Array>;
}

/** One response for each rate and each way it is written. */
export function resolveResponses(context: Context, phases: readonly Phase[], varied: readonly Varied[]): Responses {
  const parameters = new Set(varied.filter((one) => one.of.kind === 'parameter').map((one) => one.name));
  if (parameters.size === 0) return { responses: [], attributes: new Map() };
  const places = new Set<string>();
  const responses = phases.flatMap((phase, index) =>
    parts.flatMap((part) => responsesOf(context, { phase, index, part, parameters, places })),
  );
  refuseElsewhere(context, parameters, places);
  for (const response of responses) refuseOutOfBounds(context, response, varied);
  refuseTwice(context, responses, varied);
  const read = new Set(responses.flatMap((one) => namesIn(one.expression)));
  const attributes = new Map<string, Float64Array>();
  for (const name of read) {
    if (parameters.has(name) || name === 'year') continue;
    attributes.set(
      name,
      Float64Array.from(context.attributes, (own) => own.get(name) ?? 0),
    );
  }
  return { responses, attributes };
}

interface Request {
  readonly phase: Phase;
  readonly index: number;
  readonly part: ScaledPart;
  readonly parameters: ReadonlySet<string>;
  /** Where expressions stand that are worked out anew every year. */
  readonly places: Set<string>;
}

function responsesOf(context: Context, { phase, index, part, parameters, places }: Request): readonly Response[] {
  const written = tableOf(phase, part)?.written;
  if (written === undefined || phase.kind === 'demography') return [];
  const classes = context.classes.length;
  return context.classes.flatMap((_, c) => {
    const groups = new Map<string, { expression: Ast; text: string; path: SpecPath; patches: number[] }>();
    context.patches.forEach((_patch, p) => {
      const own = written[p * classes + c] ?? null;
      if (own === null) return;
      const expression = context.numbers.expanded(own.expression, own.path, parameters);
      if (expression === null || !namesIn(expression).some((name) => parameters.has(name))) return;
      places.add(own.path.join('\0'));
      const text = String(own.expression);
      const group = groups.get(text) ?? { expression, text, path: own.path, patches: [] };
      group.patches.push(p);
      groups.set(text, group);
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

/** Movement, crowding and the like are prepared once: what varies cannot stand there. */
function refuseElsewhere(context: Context, parameters: ReadonlySet<string>, places: ReadonlySet<string>): void {
  for (const use of context.numbers.uses()) {
    const { expression, path } = use;
    if (path[0] === 'parameters' || path[0] === 'variation' || places.has(path.join('\0'))) continue;
    const name = context.numbers.behind(use).find((one) => parameters.has(one));
    if (name === undefined) continue;
    fail(context, 'varies-elsewhere', path, {
      message: `\`${name}\` varies from year to year, and this number cannot`,
      details: {
        found: String(expression),
        expected: 'varied parameters in survival, births and the share that leaves only',
        fix: 'Vary the rate itself under `variation`, or use another parameter here.',
      },
    });
  }
}

function refuseTwice(context: Context, responses: readonly Response[], varied: readonly Varied[]): void {
  for (const response of responses) {
    const twice = varied.find(
      ({ of }) =>
        of.kind === 'rate' && of.phase === response.phase && of.part === response.part && of.class === response.class,
    );
    if (twice === undefined) continue;
    fail(context, 'varied-twice', ['variation'], {
      message: `${twice.name} varies by itself and through a parameter that varies`,
      part: 'key',
      details: { fix: 'Vary one of the two.' },
    });
  }
}

/** How far out, in SDs of the normal numbers, a rate must stay within its bounds; beyond it the kernel holds it to them. */
const lookedAt = 4;

/** Looks where all parameters that vary are low, high, or some low and some high. */
function refuseOutOfBounds(context: Context, response: Response, varied: readonly Varied[]): void {
  const moving = varied.filter(
    ({ name, of }) => of.kind === 'parameter' && namesIn(response.expression).includes(name),
  );
  const corners = 1 << Math.min(moving.length, 6);
  for (let corner = 0; corner < corners; corner++) {
    const values = new Map(moving.map((one, k) => [one.name, extreme(one, (corner >> k) % 2 === 0 ? -1 : 1)]));
    for (const patch of response.patches) {
      const attributes = context.attributes[patch];
      const scope = (name: string): number | undefined =>
        name === 'year' ? context.time.firstYear : (values.get(name) ?? attributes?.get(name));
      const result = evaluate(response.expression, scope, pinned);
      const inside = result.ok && result.value >= 0 && (response.bounds === 'from zero' || result.value <= 1);
      if (inside) continue;
      const found = result.ok ? `it is ${Number(result.value.toPrecision(4))}` : result.fault.message;
      fail(context, 'impossible-variation', ['variation', moving[0]?.name ?? ''], {
        message: `In a rare year ${response.name} in ${context.patches[patch]?.name ?? ''} is not possible: ${found}`,
        part: 'key',
        details: {
          expected: response.bounds === 'share' ? 'a share between 0 and 1' : 'a number from 0',
          reason: `Where the underlying normal number is ${lookedAt} standard deviations out.`,
          fix: 'Make the variation smaller, choose another shape, or write the rate with `min` or `max`.',
        },
      });
      return;
    }
  }
}

function extreme({ shape, mean, sd }: Varied, side: number): number {
  const found = distributionOf(shape, { mean: mean.epochs[0]?.[0] ?? 0, sd: sd.epochs[0]?.[0] ?? 0 });
  return found === null ? NaN : numberAt(found, side * lookedAt);
}
