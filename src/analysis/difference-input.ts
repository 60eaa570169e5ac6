// What the difference in growth between two models is told from.
import type { SparseMatrix } from '../numeric/sparse.ts';
import type { Answer } from './answer.ts';

/** What the growth is compared with. */
export interface Against {
  /** Title of the model or name of the scenario. */
  readonly name: string;
  /** Over the same states. */
  readonly matrix: SparseMatrix;
  /** By named numbers that differ; a reason where they cannot carry the difference. */
  readonly parameters: Answer<readonly ParameterShare[]>;
}

export interface ParameterShare {
  readonly name: string;
  readonly value: number;
  readonly reference: number;
  /** What the difference of this number adds to λ of the model less λ of the reference, to second order. */
  readonly contribution: number;
}
