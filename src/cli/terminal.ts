// What the terminal can show: colours and how wide.

export interface Terminal {
  readonly colour: boolean;
  readonly width: number;
}

/** Of the stream that text goes to. NO_COLOR and pipes turn colours off. */
export function terminalOf(stream: NodeJS.WriteStream): Terminal {
  // Of a pipe it is not false but missing.
  const terminal = stream.isTTY === true;
  const colour = terminal && (process.env['NO_COLOR'] ?? '') === '' && process.env['TERM'] !== 'dumb';
  const columns = terminal ? stream.columns : 0;
  return { colour, width: columns >= 40 ? Math.min(columns, 120) : 100 };
}
