// A mistake in a model or its data, as data: where it is, what was found, what was expected and how to mend it.

export type Severity = 'error' | 'warning' | 'note';

/** A stretch of a text file. Lines and columns count from 1, columns in UTF-16 code units; `text` is the whole first line. */
export interface Place {
  readonly file: string;
  readonly line: number;
  readonly column: number;
  readonly length: number;
  readonly text: string;
}

export interface Diagnostic {
  readonly severity: Severity;
  /** A stable word for the kind of mistake, such as `unknown-key`. */
  readonly code: string;
  /** One sentence in the reader's words, without a full stop when `found` or `expected` follow. */
  readonly message: string;
  readonly place?: Place;
  readonly found?: string;
  readonly expected?: string;
  /** The nearest known name to an unknown one. */
  readonly nearest?: string;
  /** How to mend it. */
  readonly fix?: string;
  /** Why it matters, for warnings; with the published source where there is one. */
  readonly reason?: string;
}
