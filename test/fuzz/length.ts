// How long the tests with random texts go on: some thousand texts where everything is tested, a hundred thousand in the long test.

export const isLong = process.env['SKEIN_TESTS'] === 'long';

/** Runs of a test that has `usual` of them. */
export function runsOf(usual: number): number {
  return isLong ? usual * 20 : usual;
}
