// How the command line ends.

export const exitCodes = {
  done: 0,
  /** The model or its data are wrong. */
  model: 1,
  /** The command line is wrong. */
  usage: 2,
  /** The work failed or was cut short. */
  work: 3,
  /** A bug in the tool. */
  bug: 70,
} as const;

export type ExitCode = (typeof exitCodes)[keyof typeof exitCodes];

/** Ends a command with a message for the person at the terminal. */
export class Ending extends Error {
  readonly exitCode: ExitCode;

  constructor(exitCode: ExitCode, message: string) {
    super(message);
    this.exitCode = exitCode;
  }
}
