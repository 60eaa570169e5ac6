/** The work could not be done since workers died again and again. */
export class ThreadsFailure extends Error {}
