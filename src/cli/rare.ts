// Outcomes are split by `run` alone: where a model asks for it, other commands say that they do not.
import type { Model } from '../model/model.ts';
import { writeError } from './output.ts';

export function tellNotSplit({ rare }: Model, what: 'A comparison' | 'A sweep', quiet: boolean | undefined): void {
  if (rare !== true || quiet === true) return;
  writeError(
    `${what} goes by plain runs, so \`rare\` has no part in it: chances too small for them stay at 0.\n` +
      '`skein run --rare --scenario NAME` estimates those of one plan.\n',
  );
}
