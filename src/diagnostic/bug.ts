// A mistake of ours, apart from mistakes in a model: those are diagnostics and are never thrown.

/** Thrown where the tool contradicts itself. Whoever shows it asks the user to report it. */
export class Bug extends Error {
  override readonly name = 'Bug';
}
