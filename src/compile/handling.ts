// What takes, moves and releases do to the animals of a landscape.
import type { AddPhase, Model, MovePhase, Phase, TakePhase } from '../model/model.ts';
import { tableAt } from './rates.ts';

export interface Handled {
  /** P·C, at the start of the phase. */
  readonly animals: Float64Array;
  readonly classes: number;
  readonly step: number;
}

/** Fewer are nobody, of whom nothing can be taken: so near zero a quota of some number takes nobody either. */
const nobody = 1e-9;

/** By cell the share that is taken: min(1, wanted / there) of its group. */
export function takenShares(phase: TakePhase | MovePhase, { animals, classes, step }: Handled): Float64Array {
  const shares = new Float64Array(animals.length);
  if (!isActive(phase, step)) return shares;
  const amounts = tableAt(phase.amounts, step);
  for (const cells of groupsOf(phase, classes)) {
    const there = cells.reduce((sum, i) => sum + (animals[i] ?? 0), 0);
    const patch = phase.together ? 0 : Math.floor((cells[0] ?? 0) / classes);
    const c = phase.byClass ? (cells[0] ?? 0) % classes : 0;
    const amount = amounts[patch * classes + c] ?? 0;
    const share = shareOf(phase, { amount, there, level: phase.levels[patch] ?? 0 });
    for (const i of cells) shares[i] = share;
  }
  return shares;
}

interface Group {
  readonly amount: number;
  readonly there: number;
  readonly level: number;
}

function shareOf({ rule }: TakePhase | MovePhase, { amount, there, level }: Group): number {
  if (rule === 'share') return amount;
  if (there <= nobody) return 0;
  if (rule === 'number') return Math.min(1, amount / there);
  return there > level ? (amount * (there - level)) / there : 0;
}

/** Cells p * C + c of each group that is not empty. */
function groupsOf(
  { patches, classes, together, byClass }: TakePhase | MovePhase,
  n: number,
): readonly (readonly number[])[] {
  const groups = new Map<string, number[]>();
  for (let p = 0; p < patches.length; p++) {
    for (let c = 0; c < n; c++) {
      if (patches[p] !== 1 || classes[c] !== 1) continue;
      const key = `${together ? 0 : p} ${byClass ? c : 0}`;
      groups.set(key, [...(groups.get(key) ?? []), p * n + c]);
    }
  }
  return [...groups.values()];
}

/** P·C animals that are there from now on. */
export function addedAnimals(phase: AddPhase, step: number): Float64Array {
  const amounts = tableAt(phase.amounts, step);
  const n = phase.survival.length;
  return amounts.map((number, i) => (isActive(phase, step) ? number * (phase.survival[i % n] ?? 0) : 0));
}

/** The model of a year that goes on: what people do in some years only is left out. */
export function lastingOnly(model: Model): Model {
  const passing = (phase: Phase): boolean => 'active' in phase && phase.active !== null;
  if (!model.phases.some(passing)) return model;
  const never = new Int32Array(model.steps);
  return { ...model, phases: model.phases.map((phase) => (passing(phase) ? { ...phase, active: never } : phase)) };
}

/** The same without releases, which bring in what did not grow here. */
export function growingOnly(model: Model): Model {
  const lasting = lastingOnly(model);
  if (!lasting.phases.some(({ kind }) => kind === 'add')) return lasting;
  const never = new Int32Array(model.steps);
  const phases = lasting.phases.map((phase) => (phase.kind === 'add' ? { ...phase, active: never } : phase));
  return { ...lasting, phases };
}

function isActive({ active }: TakePhase | MovePhase | AddPhase, step: number): boolean {
  return active === null || active[step - 1] === 1;
}
