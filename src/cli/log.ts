// How the work of a command went: what may differ from one machine and time to the next, and so is in no other file.
import { availableParallelism } from 'node:os';
import { toolVersion } from '../results/provenance.ts';

export interface Work {
  readonly command: string;
  /** Of everything that decides the result. */
  readonly hash: string;
  readonly started: Date;
  readonly threads: number;
}

export function logOf({ command, hash, started, threads }: Work): unknown {
  const { version, platform, arch } = process;
  return {
    format: 'skein-log/1',
    command,
    hash,
    version: toolVersion,
    started: started.toISOString(),
    seconds: (Date.now() - started.getTime()) / 1000,
    threads,
    host: { node: version, platform, architecture: arch, cores: availableParallelism() },
  };
}
