// Arbitrary specs without a mistake: names fit together, numbers lie in their bounds, every patch has somewhere to go.
import fc from 'fast-check';
import type { Spec } from '../../src/spec/schema/spec.ts';

const names = [
  'North fen',
  'Große Heide',
  '北沼',
  'no',
  '007',
  'a: b',
  "it's",
  '~',
  'Fen #2',
  '[x]',
  '+80',
  'min(1',
  '🐇',
];
const classNames = ['newborn', 'yearling', 'adult', 'true', '1e3', 'Alttier'];

const anyShare = fc.double({ min: 0.05, max: 0.9, noNaN: true });
const anyDecimal = fc.integer({ min: 5, max: 90 }).map((percent) => percent / 100);

/** Shares in several ways of writing: numbers, percent, expressions, conditions on the year. */
const anyRate = fc.oneof(
  anyShare,
  anyDecimal.map((share) => `${String(Math.round(share * 100))} %`),
  anyDecimal.map((share) => `${String(share)} * good`),
  anyDecimal.map((share) => `min(${String(share)}, cover)`),
  anyDecimal.map((share) => `if year < 2030 then ${String(share)} else good * cover`),
);

interface Frame {
  readonly patches: readonly string[];
  readonly classes: readonly string[];
}

const anyFrame: fc.Arbitrary<Frame> = fc.record({
  patches: fc.uniqueArray(fc.constantFrom(...names), { minLength: 1, maxLength: 4 }),
  classes: fc.uniqueArray(fc.constantFrom(...classNames), { minLength: 2, maxLength: 4 }),
});

function byName<Value>(keys: readonly string[], value: fc.Arbitrary<Value>): fc.Arbitrary<Record<string, Value>> {
  return fc.tuple(...keys.map(() => value)).map((values) => {
    return Object.fromEntries(keys.flatMap((key, i) => (values[i] === undefined ? [] : [[key, values[i]]])));
  });
}

function dispersalIn({ classes, patches }: Frame) {
  const byKernel = fc.record({
    kind: fc.constant('dispersal' as const),
    classes: fc.constantFrom([classes[0] ?? ''], 'all' as const),
    leaving: anyRate,
    'distance-between': fc.constantFrom('centroids' as const, 'nearest edges' as const),
    kernel: fc.record({ shape: fc.constant('exponential' as const), mean: fc.constantFrom(4, '4 km', '2500 m') }),
    attraction: fc.constantFrom('capacity ^ 0.5', 'area', 1),
    leavers: fc.constant('all arrive' as const),
    hazard: fc.constantFrom('0.03 per km', 0),
  });
  const [from, to] = patches;
  const shares = {
    kind: 'dispersal' as const,
    classes: 'all' as const,
    shares: from === undefined || to === undefined ? {} : { [from]: { [to]: 0.1 } },
  };
  return fc.oneof(byKernel, fc.constant(shares));
}

function outcomesIn({ classes, patches }: Frame) {
  const last = classes.at(-1) ?? '';
  const of = fc.constantFrom<string[] | 'all' | Record<string, number>>([last], 'all', { [last]: 0.5 });
  const counted = fc.constantFrom('as a whole' as const, 'in each patch' as const, 'in any patch' as const);
  const asked = { of, counted, in: fc.constant(patches.slice(0, 2)), for: fc.constant('1 year') };
  return fc.record({
    'few #1': fc.record({ ...asked, below: fc.integer({ min: 1, max: 9 }) }),
    many: fc.record({ ...asked, above: fc.integer({ min: 0, max: 90 }) }),
    fallen: fc.record({ of, 'fallen-by': fc.constantFrom('50 %', 0.9) }),
  });
}

function specIn(frame: Frame): fc.Arbitrary<Spec> {
  const { patches, classes } = frame;
  const place = fc.integer({ min: 0, max: 30 });
  const anyPatches = fc
    .tuple(...patches.map(() => fc.record({ y: place, area: anyShare, capacity: place })))
    .map((list) =>
      list.map(({ y, area, capacity }, i) => ({
        name: patches[i] ?? '',
        // Apart by more than they are wide, so that no two lie at one place.
        at: [3 * i, y] as [number, number],
        area,
        capacity: capacity + 5,
        cover: 0.5,
      })),
    );
  const crowding = fc.record({
    form: fc.constantFrom('beverton-holt' as const, 'ricker' as const),
    changes: fc.constant({ births: 'all' as const }),
    counted: fc.constant('all' as const),
    capacity: fc.constantFrom('capacity', 40),
    'where-declining': fc.constantFrom('none' as const, 'ceiling' as const),
  });
  return fc.record({
    skein: fc.constant(1 as const),
    study: fc.record({ title: fc.constantFrom(...names), invented: fc.boolean() }),
    'first-year': fc.integer({ min: 1990, max: 2040 }),
    years: fc.integer({ min: 1, max: 30 }),
    position: fc.constant('plane' as const),
    unit: fc.constant('km' as const),
    patches: anyPatches,
    counts: fc.constantFrom('females' as const, 'both sexes' as const),
    classes: fc.constant([...classes]),
    oldest: fc.constantFrom('open-ended' as const, 'terminal' as const),
    duration: fc.record({
      [classes[0] ?? '']: fc.record({
        years: fc.integer({ min: 1, max: 6 }),
        as: fc.constantFrom('fixed' as const, 'geometric' as const, 'expanded' as const),
      }),
    }),
    parameters: fc.record({ good: anyShare, brood: fc.record({ value: fc.constantFrom(2, '1 + good', '2.5') }) }),
    survival: byName(classes, anyRate),
    births: byName(classes, fc.constantFrom<number | string>('brood', 0.4, 'brood * cover', '2 * brood / 3')),
    in: byName(patches.slice(0, 1), fc.record({ survival: byName(classes.slice(1), anyShare) })),
    year: fc.constantFrom(
      ['count', 'breeding', 'survival', 'roaming', 'ageing'],
      ['breeding', 'count', 'survival', 'ageing', 'roaming'],
      ['roaming', 'breeding', 'survival', 'count', 'ageing'],
    ),
    crowding,
    start: fc.constant({ table: { [patches[0] ?? '']: { [classes.at(-1) ?? '']: 40 } } }),
    observed: fc.constant({ counts: { [patches[0] ?? '']: { 1999: 12, 2001: 31 } } }),
    outcomes: outcomesIn(frame),
    run: fc.record({ replicates: fc.integer({ min: 1, max: 9 }), seed: fc.maxSafeNat() }),
    named: dispersalIn(frame).map((roaming) => ({ roaming })),
  });
}

export const anyValidSpec: fc.Arbitrary<Spec> = anyFrame.chain(specIn);
