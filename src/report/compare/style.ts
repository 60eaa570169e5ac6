// How a comparison is told in a terminal.
import type { TextStyle } from '../terminal.ts';

export interface CompareTextStyle extends TextStyle {
  /** What the animals counted are called. */
  readonly animals: string;
  /** Everything, not only what leads to a decision. */
  readonly details: boolean;
}
