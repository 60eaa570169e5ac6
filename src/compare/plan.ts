// A plan that can be run: its model, and what it costs in each of its futures.
import type { CompiledModel } from '../pipeline.ts';
import type { DrawnValues } from '../results/draws/plan.ts';

export interface PlanAction {
  readonly name: string;
  readonly kind: 'link' | 'take' | 'move' | 'add' | 'habitat' | 'change';
  /** What is done, where and when. */
  readonly words: string;
}

/** Animals that a phase of the model handled in step t (from 1), by its place among the takes, moves and releases. */
export type HandledAnimals = (phase: number, step: number) => number;

export interface Money {
  /** Discounted to the first year. */
  readonly presentValue: number;
  readonly undiscounted: number;
  /** The present value where every price that is given as a range is at its lower end, and at its upper end. */
  readonly least: number;
  readonly most: number;
}

export type MoneyOf = (handled: HandledAnimals) => Money;

export type PlanModel =
  | { readonly compiled: CompiledModel; readonly moneyOf: MoneyOf | null }
  | { readonly compiled: null; readonly failure: string; readonly moneyOf: null };

export interface PlanToRun {
  readonly name: string;
  readonly actions: readonly PlanAction[];
  readonly compiled: CompiledModel;
  /** The plan where what is not known has these values. */
  readonly under: (values: DrawnValues) => PlanModel;
  /** Of one future; null where the model knows no costs. */
  readonly moneyOf: MoneyOf | null;
}
