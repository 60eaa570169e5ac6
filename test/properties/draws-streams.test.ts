// What a replicate gives depends on the seed, its number and the names, on nothing else.
import { describe, expect, it } from 'vitest';
import { runReplicates } from '../kernel/collect.ts';
import { openOwnImage } from '../../src/kernel/open.ts';
import type { Phase } from '../../src/model/model.ts';
import { everywhere, imageOf, movement, type Sketch } from '../kernel/models.ts';
import { sampleStates } from '../kernel/moments.ts';

const breeding = (into: readonly number[], births: readonly number[], patches: number): Phase => ({
  kind: 'breeding',
  name: 'breeding',
  births: everywhere(patches, births),
  into: Float64Array.from(into),
});
const survival = (rates: readonly number[], patches: number, name = 'survival'): Phase => ({
  kind: 'survival',
  name,
  survival: everywhere(patches, rates),
});

function sketchOf(patches: readonly string[], start: readonly number[]): Sketch {
  const ways = patches.flatMap((_, from) =>
    patches.flatMap((__, to) => (to === from ? [] : [[from, to, 0.4] as const])),
  );
  const natal: Phase = {
    kind: 'dispersal',
    name: 'natal',
    moves: Uint8Array.of(1, 1),
    leaving: everywhere(patches.length, [0.3, 0.1]),
    rule: { by: 'shares', shares: new Float64Array() },
  };
  const phases = [breeding([1, 0], [0, 0.8], patches.length), survival([0.4, 0.8], patches.length), natal];
  const ageing: Phase = { kind: 'ageing', name: 'ageing', advance: Float64Array.of(1, 0), next: Int32Array.of(1, -1) };
  const movements = [null, null, movement(patches.length, ways), null, null];
  return { patches, classes: ['young', 'adult'], phases: [...phases, ageing], start, movements };
}

const linked = sketchOf(['east', 'north', 'west'], [5, 10, 100, 200, 30, 0]);
const image = imageOf(linked);
const whole = runReplicates(image, { replicates: 40, steps: 12, seed: 77 });

describe('a run', () => {
  it('gives the same bytes again', () => {
    expect(runReplicates(image, { replicates: 40, steps: 12, seed: 77 })).toEqual(whole);
  });

  it.each([1, 3, 7, 16])('does not depend on how many replicates run side by side: %d', (lanes) => {
    expect(runReplicates(image, { replicates: 40, steps: 12, seed: 77, lanes })).toEqual(whole);
  });

  it('does not depend on which replicates run beside which', () => {
    const late = runReplicates(image, { replicates: 9, steps: 12, seed: 77, firstReplicate: 21 });
    for (let row = 0; row < 13 * whole.columns; row++) {
      const part = whole.counts.subarray(row * 40 + 21, row * 40 + 30);
      expect(late.counts.subarray(row * 9, row * 9 + 9)).toEqual(part);
    }
  });

  it('changes with every part of the seed', () => {
    const other = (seed: number) => runReplicates(image, { replicates: 40, steps: 12, seed }).counts;
    expect(other(78)).not.toEqual(whole.counts);
    expect(other(77 + 2 ** 32)).not.toEqual(whole.counts);
  });

  it('starts with the animals of the start in every column', () => {
    const starts = [345, 15, 300, 30].flatMap((n) => new Array<number>(40).fill(n));
    expect(Array.from(whole.counts.subarray(0, 160))).toEqual(starts);
  });
});

describe('animals that moved', () => {
  const leave = (shares: readonly number[]): Phase => ({
    kind: 'dispersal',
    name: 'natal',
    moves: Uint8Array.of(1, 1),
    leaving: everywhere(2, shares),
    rule: { by: 'shares', shares: new Float64Array() },
  });
  const ways = movement(2, [[0, 1, 0.8], [1, 0, 1]]); // prettier-ignore
  const sketch = { patches: ['east', 'west'], classes: ['a', 'b'], start: [400, 0, 0, 50], steps: 1 };
  const moving = imageOf({ ...sketch, phases: [leave([0.5, 0.2])], movements: [ways, null] });

  it('are summed over the replicates for each way and step, and agree with where the animals are', () => {
    const run = runReplicates(moving, { replicates: 200, steps: 1, seed: 4 });
    const sum = (column: number) =>
      run.counts.subarray((3 + column) * 200, (4 + column) * 200).reduce((a, b) => a + b, 0);
    const [eastward = 0, westward = 0] = run.moved?.animals ?? [];
    // derived: 200 × 400 × 0.5 × 0.8 and 200 × 50 × 0.2, within five standard errors.
    expect(Math.abs(eastward - 32_000)).toBeLessThan(5 * Math.sqrt(80_000 * 0.4 * 0.6));
    expect(Math.abs(westward - 2000)).toBeLessThan(5 * Math.sqrt(10_000 * 0.2 * 0.8));
    expect(sum(2)).toBe(200 * 50 + eastward - westward);
  });
});

describe('draws', () => {
  const apart: Sketch = {
    patches: ['east', 'west'],
    classes: ['young', 'adult'],
    start: [20, 30, 40, 150],
    phases: [breeding([1, 0], [0, 0.8], 2), survival([0.4, 0.8], 2)],
  };
  const states = sampleStates(apart, 48, 3);
  const cell = (found: { cells: number; animals: Float64Array }, index: number) =>
    found.animals.filter((_, i) => i % found.cells === index);

  it('of a patch stay as they are when a patch is added before it', () => {
    const phases = [breeding([1, 0], [0, 0.8], 3), survival([0.4, 0.8], 3)];
    const more = sampleStates(
      { ...apart, patches: ['copse', 'east', 'west'], start: [9, 9, ...apart.start], phases },
      48,
      3,
    );
    for (let i = 0; i < 4; i++) expect(cell(more, i + 2)).toEqual(cell(states, i));
  });

  it('of a patch stay as they are when the patches stand in another order', () => {
    const turned = sampleStates({ ...apart, patches: ['west', 'east'], start: [40, 150, 20, 30] }, 48, 3);
    for (let i = 0; i < 4; i++) expect(cell(turned, (i + 2) % 4)).toEqual(cell(states, i));
  });

  it('of a class stay as they are when a class is added before it', () => {
    const phases = [breeding([0, 1, 0], [0, 0, 0.8], 2), survival([0.5, 0.4, 0.8], 2)];
    const classes = ['egg', ...apart.classes];
    const more = sampleStates({ ...apart, classes, start: [50, 20, 30, 50, 40, 150], phases }, 48, 3);
    for (let i = 0; i < 4; i++) expect(cell(more, i + 1 + (i >> 1))).toEqual(cell(states, i));
  });

  it('of a phase stay as they are when a phase is added that takes nobody', () => {
    const more = sampleStates({ ...apart, phases: [survival([1, 1], 2, 'winter'), ...apart.phases] }, 48, 3);
    expect(more.animals).toEqual(states.animals);
  });

  it('of two phases of one kind, two patches and two classes differ', () => {
    const alike: Sketch = {
      patches: ['east', 'west'],
      classes: ['a', 'b'],
      start: [60, 60, 60, 60],
      phases: [survival([0.5, 0.5], 2)],
    };
    const first = sampleStates(alike, 48);
    const second = sampleStates({ ...alike, phases: [survival([0.5, 0.5], 2, 'winter')] }, 48);
    const draws = [0, 1, 2, 3].flatMap((i) => [cell(first, i).join(), cell(second, i).join()]);
    expect(new Set(draws).size).toBe(8);
  });

  it('let more survive, never fewer, where a rate is raised', () => {
    const low = sampleStates({ ...apart, phases: [survival([0.4, 0.7], 2)], start: [20, 30, 40, 120] }, 480);
    const high = sampleStates({ ...apart, phases: [survival([0.45, 0.75], 2)], start: [20, 30, 40, 120] }, 480);
    expect(high.animals.every((n, i) => n >= low.animals[i]!)).toBe(true);
  });
});

describe('a lane', () => {
  it('goes on from a saved state as if it had never been away, in any other lane', () => {
    const numbers = (machine: ReturnType<typeof openOwnImage>) =>
      new Uint32Array(machine.memory.buffer, machine.replicates(), 16).set(Array.from({ length: 16 }, (_, i) => i));
    const lane = (machine: ReturnType<typeof openOwnImage>, index: number) =>
      new Int32Array(machine.memory.buffer, machine.animals(), 96).filter((_, i) => i % 16 === index);
    const machine = openOwnImage(image);
    const store = machine.reserve(machine.laneBytes());
    numbers(machine);
    machine.start(16, 77, 0);
    machine.run(5);
    machine.saveLane(3, store);
    machine.run(5);
    const expected = lane(machine, 3);
    machine.start(16, 77, 0);
    expect(machine.restoreLane(11, store)).toBe(0);
    machine.setBatchStep(5);
    expect(machine.restoreLane(11, store)).toBe(1);
    machine.run(5);
    expect(lane(machine, 11)).toEqual(expected);
  });
});

describe('a replicate with more animals than can be counted', () => {
  const boom = imageOf({
    patches: ['east'],
    classes: ['a'],
    start: [900_000_000],
    phases: [breeding([1], [0.11112], 1), survival([0.9999], 1)],
    steps: 3,
  });
  const run = runReplicates(boom, { replicates: 64, steps: 2, seed: 3 });

  it('is stopped with the step and the reason, and its counts are empty from then on', () => {
    expect(run.stopped.length).toBeGreaterThan(0);
    const [first] = run.stopped;
    expect(first?.reason).toBe('more than 1,000,000,000 animals in the phase breeding');
    expect(run.counts[first!.step * 2 * 64 + first!.replicate]).toBe(0);
  });

  it('leaves the others as they would be alone', () => {
    const alone = runReplicates(boom, { replicates: 64, steps: 2, seed: 3, lanes: 1 });
    expect(alone).toEqual(run);
  });
});
