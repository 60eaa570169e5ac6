// The path in rows of patches, and sixteen courses side by side, add and multiply in the order in which one would go patch by patch:
// the same bits for any number of patches, whether ways stand in lists or in a table of all pairs.
import { describe, expect, it } from 'vitest';
import { openOwnCourses, pathOf } from '../../src/kernel/open-path.ts';
import { runPath } from '../../src/kernel/path.ts';
import type { Phase } from '../../src/model/model.ts';
import { stream } from '../bench/measure.ts';
import { imageOf, movement, table, type Sketch } from './models.ts';

const classes = ['a', 'b', 'c'];
const C = classes.length;
const steps = 6;

interface Landscape {
  readonly patches: number;
  readonly ways: readonly (readonly [number, number, number])[];
  readonly next: () => number;
}

function landscapeOf(patches: number, share: number): Landscape {
  const next = stream(patches * 1000 + share * 100);
  const pairs = Array.from({ length: patches * patches }, (_, k) => [Math.floor(k / patches), k % patches] as const);
  const chosen = pairs.filter(([from, to]) => from !== to && next() < share);
  return { patches, ways: chosen.map(([from, to]) => [from, to, next() / patches] as const), next };
}

/** What a year does, and the same year as one would write it down. */
function lives({ patches, ways, next }: Landscape) {
  const numbers = (most: number): number[] => Array.from({ length: patches * C }, () => next() * most);
  const [births, rates, leaving] = [numbers(2), numbers(1), numbers(0.6)];
  const coefficients = Array.from({ length: patches }, () => next() / 50);
  const start = Array.from({ length: patches * C }, () => Math.floor(next() * 40));
  const phases: Phase[] = [
    { kind: 'breeding', name: 'breeding', births: table(births), into: Float64Array.of(1, 0, 0) },
    { kind: 'survival', name: 'survival', survival: table(rates) },
    {
      kind: 'dispersal',
      name: 'moving',
      moves: Uint8Array.of(1, 0, 1),
      leaving: table(leaving),
      rule: { by: 'shares', shares: new Float64Array() },
    },
    {
      kind: 'ageing',
      name: 'ageing',
      advance: Float64Array.of(1, 0.3, 0),
      next: Int32Array.of(1, 2, -1),
    },
  ];
  const sketch: Sketch = {
    patches: Array.from({ length: patches }, (_, p) => `p${String(p).padStart(3, '0')}`),
    classes,
    phases,
    start,
    steps,
    movements: [null, null, movement(patches, ways), null, null],
    crowding: [
      {
        name: 'crowding',
        form: 'beverton-holt',
        counted: Float64Array.of(0.5, 1, 1),
        changes: [{ phase: 1, part: 'survival', classes: Uint8Array.of(1, 0, 0) }],
        capacity: new Float64Array(patches).fill(100),
        alleeHalf: new Float64Array(patches),
        whereDeclining: null,
      },
    ],
    coefficients: [
      {
        form: coefficients.map(() => 'beverton-holt' as const),
        coefficient: Float64Array.from(coefficients),
        alleeHalf: new Float64Array(patches),
      },
    ],
  };
  const year = (before: Float64Array): Float64Array => {
    const n = Float64Array.from(before);
    const at = (p: number, c: number): number => n[p * C + c]!;
    const crowd = (p: number): number => 1 / (1 + coefficients[p]! * (0.5 * at(p, 0) + at(p, 1) + at(p, 2)));
    for (let p = 0; p < patches; p++) {
      let young = 0;
      for (let c = 0; c < C; c++) young += at(p, c) * births[p * C + c]!;
      n[p * C] = at(p, 0) + young;
      const factor = crowd(p);
      for (let c = 0; c < C; c++) n[p * C + c] = at(p, c) * rates[p * C + c]! * (c === 0 ? factor : 1);
    }
    const leavers = n.map((animals, i) => (i % C === 1 ? 0 : animals * leaving[i]!));
    const arrivals = new Float64Array(n.length);
    for (const [from, to, chance] of ways) {
      for (let c = 0; c < C; c++) arrivals[to * C + c]! += leavers[from * C + c]! * chance;
    }
    n.forEach((animals, i) => (n[i] = animals - leavers[i]! + arrivals[i]!));
    for (let p = 0; p < patches; p++) {
      const older = at(p, 1) * 0.3;
      n.set([0, at(p, 0) + (at(p, 1) - older), older + at(p, 2)], p * C);
    }
    return n;
  };
  return { image: imageOf(sketch), start, year };
}

describe.each([1, 2, 3, 7, 8, 9, 15, 16, 17, 23, 24, 25, 26, 33, 42, 43, 50, 52, 53, 61])('%i patches', (patches) => {
  it.each([0.05, 0.5, 1])('with this share of all ways: %f', (share) => {
    const { image, start, year } = lives(landscapeOf(patches, share));
    const { animals } = runPath(image, { steps });
    let expected: Float64Array = Float64Array.from(start);
    for (let t = 0; t <= steps; t++) {
      if (t > 0) expected = year(expected);
      expect(animals.subarray(t * expected.length, (t + 1) * expected.length)).toEqual(expected);
    }
  });
});

describe('sixteen courses', () => {
  it.each([0.05, 1])('are the path, where years do not differ, with this share of all ways: %f', (share) => {
    const { image } = lives(landscapeOf(19, share));
    const machine = openOwnCourses(image);
    const [here, totals] = [
      pathOf(machine, image),
      new Float64Array(machine.memory.buffer, machine.courseTotals(), 16),
    ];
    machine.startPath();
    machine.startCourses();
    for (let t = 0; t < steps; t++) {
      machine.stepPath();
      machine.stepCourses();
    }
    machine.readPath();
    machine.sumCourses();
    const sum = here.reduce((all, animals) => all + animals, 0);
    expect(sum).toBeGreaterThan(1);
    expect(Array.from(totals)).toEqual(Array.from({ length: 16 }, () => sum));
  });

  it('of nobody go back to what was put aside', () => {
    const { image } = lives(landscapeOf(4, 1));
    const machine = openOwnCourses(image);
    const totals = (): number[] => {
      machine.sumCourses();
      return Array.from(new Float64Array(machine.memory.buffer, machine.courseTotals(), 16));
    };
    machine.startCourses();
    machine.fillCourses(3);
    machine.holdCourses();
    machine.fillCourses(0);
    totals();
    machine.scaleCourses(1);
    expect(totals()).toEqual(Array.from({ length: 16 }, () => 36));
    machine.scaleCourses(12);
    expect(totals()).toEqual(Array.from({ length: 16 }, () => 12));
  });
});
