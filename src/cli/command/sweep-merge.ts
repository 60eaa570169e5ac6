// skein sweep merge: joins what shards of one sweep made.
import { readFileSync } from 'node:fs';
import { Ending, exitCodes } from '../exit.ts';
import { finishSweep } from '../sweep/finish.ts';
import { differenceOf } from '../sweep/difference.ts';
import { openSweep, type OpenedSweep } from '../sweep/opened.ts';
import { finishedParts, openStore, partPath, type Store } from '../sweep/store.ts';
import { tellSweep, writeLog } from '../sweep/tell.ts';
import { missingWords } from '../sweep/missing.ts';

export interface MergeOptions {
  readonly out: string;
  readonly json?: boolean;
  readonly details?: boolean;
  readonly quiet?: boolean;
}

export async function mergeSweeps(
  folders: readonly string[],
  { out, json, details, quiet }: MergeOptions,
): Promise<void> {
  const started = new Date();
  const opened = folders.map(openSweep);
  const [first] = opened;
  if (first === undefined) throw new Ending(exitCodes.usage, 'Name the folders of the shards.');
  const { manifest } = first;
  for (const { folder, text } of opened) {
    if (text === first.text) continue;
    const what = differenceOf(text, manifest);
    throw new Ending(exitCodes.work, `${folder} and ${first.folder} are of different sweeps: of ${folder}, ${what}.`);
  }
  const store = openStore(out, manifest);
  try {
    takeParts(store, opened);
    const missing = missingWords(manifest.parts, store.finished());
    if (missing !== null)
      throw new Ending(exitCodes.work, `${out} is not complete: ${missing}. What is there is kept.`);
    const summary = await finishSweep(out, manifest);
    writeLog(out, { command: 'sweep merge', hash: manifest.hash, started, threads: 1 });
    if (json === true || quiet !== true) tellSweep(summary, { json: json === true, details: details === true });
  } finally {
    store.close();
  }
}

/** A part that two shards have must be the same in both. */
function takeParts(store: Store, opened: readonly OpenedSweep[]): void {
  const there = new Set(store.finished());
  for (const { folder } of opened) {
    for (const part of [...finishedParts(folder)].sort((a, b) => a - b)) {
      const bytes = readFileSync(partPath(folder, part));
      if (!there.has(part)) store.write(part, [bytes]);
      else if (!bytes.equals(readFileSync(partPath(store.folder, part)))) {
        const why = 'one of them is damaged, or was changed';
        throw new Ending(exitCodes.work, `Part ${part + 1} in ${folder} differs from that in ${store.folder}: ${why}.`);
      }
      there.add(part);
    }
  }
}
