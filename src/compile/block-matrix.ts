// The block projection matrix from one count to the next, and the phase maps that it is the product of.
import type { SparseMatrix } from '../numeric/sparse.ts';

/** Where the matrix was taken: with nobody there, where it stands still, or at the start. */
export type AtState = 'zero' | 'equilibrium' | 'start';

export interface BlockMatrix {
  /** Rows are to, columns are from. Patch by patch, classes in order within a patch. */
  readonly matrix: SparseMatrix;
  /** What row and column i stand for; classes that are always empty at the count are left out. */
  readonly states: readonly { readonly patch: number; readonly class: number }[];
  readonly patches: readonly string[];
  readonly classes: readonly string[];
  readonly at: AtState;
  /** In the order of the year, the first to act first; each P·C × P·C over all patches and classes. */
  readonly phaseMaps: readonly { readonly phase: string; readonly map: SparseMatrix }[];
}
