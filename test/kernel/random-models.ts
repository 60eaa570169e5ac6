// Random small models for property tests: any phases in any order, one or two epochs, zeros among the numbers.
import fc from 'fast-check';
import type { CrowdingCoefficients } from '../../src/compile/coefficients.ts';
import type { Movement } from '../../src/landscape/landscape.ts';
import type {
  BreedingPhase,
  CeilingPhase,
  Crowding,
  Mating,
  Offspring,
  Phase,
  RateTable,
} from '../../src/model/model.ts';
import { movement, type Sketch } from './models.ts';

/** The models know which epoch holds in so many steps. */
export const steps = 3;
const share = fc.double({ min: 0, max: 1, noNaN: true });

/** One or two epochs of the same size. */
function tables(columns: number, value: fc.Arbitrary<number>): fc.Arbitrary<RateTable> {
  const epoch = fc
    .array(value, { minLength: columns, maxLength: columns })
    .map((numbers) => Float64Array.from(numbers));
  const one = epoch.map((only): RateTable => ({ epochs: [only], epochOf: new Int32Array() }));
  const two = fc.tuple(epoch, epoch).map((epochs): RateTable => ({ epochs, epochOf: Int32Array.of(1, 0, 1) }));
  return fc.oneof(one, two);
}

/** Shares that sum to at most 1, one a class, with zeros among them. */
function partition(parts: number, sum: number): fc.Arbitrary<number[]> {
  const raw = fc.array(fc.oneof(fc.constant(0), share), { minLength: parts, maxLength: parts });
  return raw.map((weights) => {
    const all = weights.reduce((a, b) => a + b, 0);
    return all === 0 ? weights : weights.map((weight) => (weight / all) * sum);
  });
}

const flag = fc.constantFrom(0, 1);
const bytes = (length: number) =>
  fc.array(flag, { minLength: length, maxLength: length }).map((list) => Uint8Array.from(list));

function ceilingOf(P: number, C: number): fc.Arbitrary<CeilingPhase> {
  const room = fc.array(fc.double({ min: 0, max: 60, noNaN: true }), { minLength: P, maxLength: P });
  const takes = fc.constantFrom('at random' as const, 'youngest first' as const, 'nobody' as const);
  return fc.tuple(bytes(C), room, takes).map(([counted, capacity, who]) => ({
    kind: 'ceiling',
    name: 'x',
    counted,
    capacity: Float64Array.from(capacity),
    takes: who,
  }));
}

/** No mean of these models exceeds the largest litter of 12. */
function offspringOf(C: number): fc.Arbitrary<Offspring | null> {
  const chances = Float64Array.of(0.2, 0.5, 0, 0.3);
  return fc.constantFrom(
    null,
    { by: 'binomial' as const, largest: 12 },
    { by: 'negative binomial' as const, size: 0.7 },
    { by: 'table' as const, chances: Array.from({ length: C }, () => chances) },
  );
}

function matingOf(C: number): fc.Arbitrary<Mating | null> {
  const form = fc.constantFrom('female-dominant' as const, 'harmonic mean' as const, 'minimum' as const);
  const females = Uint8Array.from({ length: C }, (_, c) => (c % 2 === 0 ? 1 : 0));
  const mating = fc.tuple(form, fc.double({ min: 0.5, max: 5, noNaN: true })).map(([chosen, femalesPerMale]) => ({
    form: chosen,
    females,
    males: females.map((female) => 1 - female),
    femalesPerMale,
  }));
  return fc.oneof(fc.constant(null), mating);
}

function handlingOf(P: number, C: number): fc.Arbitrary<Phase> {
  const active = fc.oneof(fc.constant(null), fc.constantFrom(Int32Array.of(1, 0, 1), Int32Array.of(0, 1, 1)));
  const levels = fc.array(fc.double({ min: 0, max: 90, noNaN: true }), { minLength: P, maxLength: P });
  const rule = fc.constantFrom('number' as const, 'share' as const, 'excess' as const);
  const kind = fc.constantFrom('take' as const, 'move' as const, 'add' as const);
  const base = fc.record({
    active,
    patches: bytes(P),
    classes: bytes(C),
    together: fc.boolean(),
    byClass: fc.boolean(),
    rule,
  });
  return fc
    .tuple(kind, base, levels, tables(P * C, share), share)
    .map(([what, own, level, shares, survival]): Phase => {
      const times = own.rule === 'number' || what === 'add' ? 40 : 1;
      const amounts = { ...shares, epochs: shares.epochs.map((epoch) => epoch.map((value) => value * times)) };
      const { active: years, patches, classes, ...quota } = own;
      const phase = { name: 'x', active: years, patches, classes, amounts };
      if (what === 'add') {
        const there = epochsIn(amounts, { patches, classes });
        return { kind: 'add', ...phase, amounts: there, survival: new Float64Array(C).fill(survival) };
      }
      const levelled = { ...phase, ...quota, levels: Float64Array.from(level) };
      if (what === 'take') return { kind: 'take', ...levelled };
      const from = patches.map((one, p) => (p === 0 ? 0 : one));
      const living = new Float64Array(C).fill(survival);
      return {
        kind: 'move',
        ...levelled,
        patches: from,
        to: 0,
        survival: living,
        homing: survival < 0.5 ? survival : 0,
      };
    });
}

/** Amounts of 0 outside of the patches and classes. */
function epochsIn(
  amounts: RateTable,
  { patches, classes }: { readonly patches: Uint8Array; readonly classes: Uint8Array },
): RateTable {
  const n = classes.length;
  const inside = (i: number) => (patches[Math.floor(i / n)] ?? 0) * (classes[i % n] ?? 0);
  return { ...amounts, epochs: amounts.epochs.map((epoch) => epoch.map((value, i) => value * inside(i))) };
}

function phaseOf(P: number, C: number): fc.Arbitrary<readonly [Phase, Movement | null]> {
  const young = fc.oneof(fc.constant(0), fc.double({ min: 0, max: 3, noNaN: true }));
  const still = (phase: fc.Arbitrary<Phase>) => phase.map((made) => [made, null] as const);
  const survival = tables(P * C, share).map((rates): Phase => ({ kind: 'survival', name: 'x', survival: rates }));
  const into = partition(C, 1).map((shares) =>
    Float64Array.from(shares.some((s) => s > 0) ? shares : [1, ...shares.slice(1)]),
  );
  const breeding = fc
    .tuple(tables(P * C, young), into)
    .map(([births, enters]): BreedingPhase => ({ kind: 'breeding', name: 'x', births, into: enters }));
  const mated = fc
    .tuple(breeding, offspringOf(C), matingOf(C), ceilingOf(P, C))
    .map(([phase, offspring, mating, waits]) => ({
      ...phase,
      ...(offspring === null ? {} : { offspring }),
      ...(mating === null ? {} : { mating }),
      ...(waits.takes === 'nobody' ? { waits } : {}),
    }));
  const next = Int32Array.from({ length: C }, (_, c) => (c + 1 < C ? c + 1 : -1));
  const ageing = fc
    .array(fc.oneof(flag, share), { minLength: C, maxLength: C })
    .map((advance): Phase => ({ kind: 'ageing', name: 'x', advance: Float64Array.from(advance), next }));
  const columns = fc.array(
    share.chain((sum) => partition(C, sum)),
    { minLength: P * C, maxLength: P * C },
  );
  const fates = columns.map((list): RateTable => {
    const entries = new Float64Array(P * C * C);
    list.forEach((column, pc) =>
      column.forEach((f, to) => (entries[Math.floor(pc / C) * C * C + to * C + (pc % C)] = f)),
    );
    return { epochs: [entries], epochOf: new Int32Array() };
  });
  const demography = fc
    .tuple(fates, tables(P * C * C, young))
    .map(([life, births]): Phase => ({ kind: 'demography', name: 'x', fates: life, births }));
  const dispersal = fc
    .tuple(
      bytes(C),
      tables(P * C, share),
      fc.array(
        share.chain((sum) => partition(P, sum)),
        { minLength: P, maxLength: P },
      ),
    )
    .map(([moves, leaving, ends]): readonly [Phase, Movement] => {
      const rows = ends.flatMap((chances, from) =>
        chances.flatMap((chance, to) => (to === from || chance === 0 ? [] : [[from, to, chance] as const])),
      );
      const rule = { by: 'shares' as const, shares: new Float64Array() };
      return [{ kind: 'dispersal', name: 'x', moves, leaving, rule }, movement(P, rows)];
    });
  const phases = [survival, breeding, mated, ageing, demography, ceilingOf(P, C), handlingOf(P, C)];
  return fc.oneof(...phases.map(still), dispersal);
}

function crowdingOf(
  P: number,
  C: number,
  phases: readonly Phase[],
): fc.Arbitrary<readonly [Crowding, CrowdingCoefficients]> {
  const form = fc.constantFrom('beverton-holt' as const, 'ricker' as const, 'ceiling' as const, 'none' as const);
  const numbers = fc.array(fc.double({ min: 0.001, max: 0.1, noNaN: true }), { minLength: P, maxLength: P });
  return fc.tuple(form, numbers, bytes(C), fc.constantFrom(0, 7)).map(([shape, coefficient, classes, half]) => {
    const changes = phases.flatMap((phase, index): Crowding['changes'][number][] => {
      if (phase.kind === 'survival') return [{ phase: index, part: 'survival' as const, classes }];
      if (phase.kind === 'breeding') return [{ phase: index, part: 'births' as const, classes }];
      return phase.kind === 'demography' ? [{ phase: index, part: 'fates' as const, classes }] : [];
    });
    const alleeHalf = new Float64Array(P).fill(half);
    const scale = shape === 'ceiling' ? 300 : 1;
    return [
      {
        name: 'c',
        form: 'ricker',
        counted: new Float64Array(C).fill(0.5),
        changes,
        capacity: alleeHalf,
        alleeHalf,
        whereDeclining: null,
      },
      {
        form: alleeHalf.length > 0 ? Array.from(alleeHalf, () => shape) : [],
        coefficient: Float64Array.from(coefficient, (k) => k * scale),
        alleeHalf,
      },
    ];
  });
}

/** Models of up to four patches and classes, with up to so many phases and up to two crowdings. */
export function sketches(mostPhases: number): fc.Arbitrary<Sketch> {
  return fc.tuple(fc.integer({ min: 1, max: 4 }), fc.integer({ min: 1, max: 4 })).chain(([P, C]) =>
    fc
      .tuple(
        fc.array(phaseOf(P, C), { minLength: 1, maxLength: mostPhases }),
        fc.array(fc.integer({ min: 0, max: 150 }), { minLength: P * C, maxLength: P * C }),
      )
      .chain(([made, start]) => {
        const phases = made.map(([phase], i) => ({ ...phase, name: `phase ${String(i)}` }));
        return fc.array(crowdingOf(P, C, phases), { maxLength: 2 }).map((crowded) => {
          const used = crowded.filter(([crowding]) => crowding.changes.length > 0);
          return {
            patches: Array.from({ length: P }, (_, p) => `p${String(p)}`),
            classes: Array.from({ length: C }, (_, c) => `c${String(c)}`),
            phases,
            start,
            movements: [...made.map(([, ways]) => ways), null],
            crowding: used.map(([crowding], k) => ({ ...crowding, name: `c${String(k)}` })),
            coefficients: used.map(([, coefficients]) => coefficients),
            steps,
          };
        });
      }),
  );
}
