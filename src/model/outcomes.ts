// Outcomes: of whom, where, what must be so, and for how long.
import type { SpecPath } from '../spec/document.ts';
import { readQuantity } from '../spec/quantity.ts';
import type { OutcomeSpec } from '../spec/schema/spec.ts';
import { classWeights } from './class-weights.ts';
import { fail, patchIndex, type Context } from './context.ts';
import type { OutcomeEvent, OutcomeRule, Sex } from './model.ts';
import { outcomeDefinition, outcomeWords } from './outcome-words.ts';
import { wholeYears } from './years.ts';

export function resolveOutcomes(context: Context): readonly OutcomeRule[] {
  return Object.entries(context.spec.outcomes ?? {}).flatMap(([name, spec]) => {
    const rule = resolveOutcome(context, name, spec);
    return rule === null ? [] : [rule];
  });
}

function countedClasses(context: Context, spec: OutcomeSpec, path: SpecPath): Float64Array {
  const zeros = typeof spec.of === 'object' && Object.values(spec.of).every((weight) => weight === 0);
  if (zeros) {
    fail(context, 'outcome-shape', [...path, 'of'], {
      message: 'Nobody is counted here',
      details: { expected: 'a class with a weight above 0' },
    });
  }
  return classWeights(context, spec.of, [...path, 'of']);
}

const wishes = ['below', 'above', 'fallen-by', 'lacking'] as const;
type Wish = (typeof wishes)[number];

/** Null after telling what is missing or too much. */
function resolveOutcome(context: Context, name: string, spec: OutcomeSpec): OutcomeRule | null {
  const path = ['outcomes', name];
  const wish = onlyWish(context, spec, path);
  const weights = countedClasses(context, spec, path);
  const patches = patchMask(context, spec, path);
  const counts = countsOf(context, spec, path);
  const event = wish === null ? null : eventOf(context, { spec, wish, path });
  if (event === null) return null;
  if (event.is === 'fallen' && (spec.counted ?? 'as a whole') !== 'as a whole') {
    fail(context, 'outcome-shape', [...path, 'counted'], {
      message: 'A fall is that of one count since the start, so the patches are added up',
      details: { fix: 'Make an outcome of each patch, with `in: PATCH`.' },
    });
    return null;
  }
  const rows = wish === 'lacking' ? bySex(context, weights, path) : [weights];
  if (rows === null) return null;
  const over = overOf(spec.counted, event);
  const rule = { weights: rows, patches, over, event, counts };
  const words = {
    females: context.spec.counts === 'females',
    classes: context.classes,
    patches: spec.in === undefined ? null : [spec.in].flat(),
    only: context.patches.length === 1 ? (context.patches[0]?.name ?? null) : null,
    counted: spec.counted ?? 'as a whole',
  };
  return { name, ...rule, definition: outcomeDefinition(rule, words), words: outcomeWords(rule) };
}

function onlyWish(context: Context, spec: OutcomeSpec, path: SpecPath): Wish | null {
  const given = wishes.filter((key) => spec[key] !== undefined);
  const [first = null, second] = given;
  if (first !== null && second === undefined) return first;
  fail(context, 'outcome-shape', second === undefined ? path : [...path, second], {
    message: second === undefined ? 'The outcome does not say what must be so' : 'The outcome says two things at once',
    part: 'key',
    details: {
      expected: 'one of `below`, `above`, `fallen-by` and `lacking`',
      ...(second === undefined ? {} : { fix: 'Make two outcomes of it.' }),
    },
  });
  return null;
}

interface Wished {
  readonly spec: OutcomeSpec;
  readonly wish: Wish;
  readonly path: SpecPath;
}

function eventOf(context: Context, { spec, wish, path }: Wished): OutcomeEvent | null {
  if (wish === 'below') return { is: 'below', than: spec.below ?? 0 };
  if (wish === 'above') return { is: 'above', than: spec.above ?? 0 };
  // Nobody of one sex: the scarcer sex counts less than one animal.
  if (wish === 'lacking') return { is: 'below', than: 1 };
  const read = readQuantity(spec['fallen-by'] ?? 0, 'share');
  if (read.ok && read.value > 0 && read.value <= 1) return { is: 'fallen', by: read.value };
  fail(context, 'out-of-range', [...path, 'fallen-by'], {
    message: 'A count can fall by no more than all of it',
    details: { found: String(spec['fallen-by']), expected: 'a share above 0 and up to 1, such as `50 %`' },
  });
  return null;
}

/** The weights of each sex by themselves, each animal counting 1; null after telling that there is no such thing. */
function bySex(context: Context, weights: Float64Array, path: SpecPath): readonly Float64Array[] | null {
  const { sexes } = context;
  const of = (sex: Sex) => weights.map((weight, c) => (weight > 0 && sexes?.[c] === sex ? 1 : 0));
  const rows = [of('female'), of('male')];
  if (rows.every((row) => row.some((weight) => weight > 0))) return rows;
  fail(context, 'outcome-shape', [...path, 'lacking'], {
    message:
      sexes === null
        ? 'The sexes are not told apart here, so none can be lacking'
        : 'Only classes of one sex are counted here',
    part: 'key',
    details: {
      expected: sexes === null ? '`classes: { females: […], males: […] }`' : 'classes of both sexes in `of`',
    },
  });
  return null;
}

function countsOf(context: Context, spec: OutcomeSpec, path: SpecPath): number {
  const counts = wholeYears(context, spec.for, [...path, 'for']);
  const { steps } = context.time;
  if (counts <= steps) return counts;
  fail(context, 'outcome-shape', [...path, 'for'], {
    message: `Only ${steps} ${steps === 1 ? 'year is' : 'years are'} looked ahead, so this can never be`,
    details: { found: String(spec.for), fix: 'Look further with `years`, or ask for a shorter time.' },
  });
  return 1;
}

/** In each patch: even the largest count is below, or even the smallest is above; in any patch the other way round. */
function overOf(counted: OutcomeSpec['counted'], event: OutcomeEvent): OutcomeRule['over'] {
  if (counted === undefined || counted === 'as a whole') return 'sum';
  return (counted === 'in each patch') === (event.is === 'above') ? 'smallest' : 'largest';
}

function patchMask(context: Context, spec: OutcomeSpec, path: SpecPath): Uint8Array {
  const mask = new Uint8Array(context.patches.length);
  if (spec.in === undefined) return mask.fill(1);
  const one = typeof spec.in === 'string';
  [spec.in].flat().forEach((patch, i) => {
    const p = patchIndex(context, patch, one ? [...path, 'in'] : [...path, 'in', i], 'value');
    if (p >= 0) mask[p] = 1;
  });
  return mask;
}
