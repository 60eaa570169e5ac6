// How a sweep is told in a terminal.
import type { TextStyle } from '../terminal.ts';

export interface SweepTextStyle extends TextStyle {
  /** Everything, not only what leads to an answer. */
  readonly details: boolean;
}
