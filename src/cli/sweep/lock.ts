// A lock on a folder, so that two processes do not do the same work. It is a courtesy, not what keeps results whole: parts are
// named when they are finished, and whoever makes one makes the same bytes.
import { closeSync, openSync, readFileSync, rmSync, statSync, utimesSync } from 'node:fs';
import { hostname } from 'node:os';
import { Ending, exitCodes } from '../exit.ts';
import { codeOf, reasonOf, writeAll } from '../output.ts';

interface Holder {
  readonly host: string;
  readonly process: number;
  /** When the process began, so that another of the same number is not taken for it; null where that cannot be known. */
  readonly began: string | null;
}

/** A holder on another machine that has not been heard of for so long is gone. */
const silenceMs = 120_000;
const beatMs = 15_000;

/** Gives what lets go of the folder; an ending where another process holds it. */
export function lockFolder(path: string, folder: string): () => void {
  for (let attempt = 0; ; attempt++) {
    const descriptor = tryOpen(path);
    if (descriptor !== null) return hold(path, descriptor);
    const holder = holderOf(path);
    if (holder !== null && (isAlive(holder, path) || attempt > 2)) {
      const whose = `process ${holder.process} on ${holder.host}`;
      throw new Ending(
        exitCodes.work,
        `Another sweep is at work in ${folder} (${whose}); wait for it, or take another folder.`,
      );
    }
    rmSync(path, { force: true });
  }
}

function tryOpen(path: string): number | null {
  try {
    return openSync(path, 'wx');
  } catch (error) {
    if (codeOf(error) === 'EEXIST') return null;
    throw new Ending(exitCodes.work, `Cannot write ${path}: ${reasonOf(error)}.`);
  }
}

function hold(path: string, descriptor: number): () => void {
  const holder: Holder = { host: hostname(), process: process.pid, began: beganAt(process.pid) };
  try {
    writeAll(descriptor, `${JSON.stringify(holder)}\n`, path);
  } finally {
    closeSync(descriptor);
  }
  const beat = setInterval(() => {
    try {
      const now = new Date();
      utimesSync(path, now, now);
    } catch {
      // Taken away by hand: the work goes on, and harms nobody.
    }
  }, beatMs);
  beat.unref();
  return () => {
    clearInterval(beat);
    rmSync(path, { force: true });
  };
}

/** Null where the lock is gone, or was cut short while it was written. */
function holderOf(path: string): Holder | null {
  try {
    const read: unknown = JSON.parse(readFileSync(path, 'utf8'));
    if (typeof read !== 'object' || read === null) return null;
    const { host, process: number, began } = Object.fromEntries(Object.entries(read));
    return { host: String(host), process: Number(number), began: typeof began === 'string' ? began : null };
  } catch {
    return null;
  }
}

function isAlive({ host, process: number, began }: Holder, path: string): boolean {
  if (host !== hostname()) {
    const touched = statSync(path, { throwIfNoEntry: false })?.mtimeMs ?? 0;
    return Date.now() - touched < silenceMs;
  }
  if (number === process.pid) return false;
  try {
    process.kill(number, 0);
  } catch (error) {
    if (codeOf(error) === 'ESRCH') return false;
  }
  return began === null || beganAt(number) === began;
}

/** Linux tells when a process began, in ticks since the machine did. */
function beganAt(number: number): string | null {
  try {
    const text = readFileSync(`/proc/${number}/stat`, 'utf8');
    return text.slice(text.lastIndexOf(')')).split(' ')[20] ?? null;
  } catch {
    return null;
  }
}
