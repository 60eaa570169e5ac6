// Which classes can be there at the count. Counting before breeding finds nobody newborn, so that class is left out.
import type { Model, Phase, RateTable } from '../model/model.ts';
import { advanceAt } from './advance.ts';

/** 1 for each class that belongs into the block matrix: all but those that are filled and emptied again between two counts. */
export function presentClasses(model: Model): Uint8Array {
  const n = model.classes.length;
  let there: Uint8Array = new Uint8Array(n).fill(1);
  const born = new Uint8Array(n);
  for (const phase of model.phases) there = after(model, { phase, there, born });
  return there.map((present, c) => (present === 1 || born[c] === 0 ? 1 : 0));
}

/** For each phase the classes of which somebody can be there when it begins. */
export function classesByPhase(model: Model): readonly Uint8Array[] {
  const born = new Uint8Array(model.classes.length);
  let there = presentClasses(model);
  return model.phases.map((phase) => {
    const before = there;
    there = after(model, { phase, there, born });
    return before;
  });
}

interface Passing {
  readonly phase: Phase;
  readonly there: Uint8Array;
  readonly born: Uint8Array;
}

function after(model: Model, { phase, there, born }: Passing): Uint8Array {
  const n = model.classes.length;
  const next = new Uint8Array(n);
  const someone = there.some((present) => present === 1);
  switch (phase.kind) {
    case 'breeding':
      there.forEach((present, c) => {
        const young = someone && (phase.into[c] ?? 0) > 0 ? 1 : 0;
        if (young === 1) born[c] = 1;
        next[c] = Math.max(present, young);
      });
      return next;
    case 'ageing':
      there.forEach((present, c) => {
        if (present === 0) return;
        const to = phase.next[c] ?? -1;
        const somewhere = (is: (share: number) => boolean): boolean =>
          model.patches.some((_, patch) => is(advanceAt(phase, { patch, class: c })));
        if (somewhere((share) => share < 1)) next[c] = 1;
        if (to >= 0 && somewhere((share) => share > 0)) next[to] = 1;
      });
      return next;
    case 'demography':
      for (let i = 0; i < n * n; i++) {
        const [to, from] = [Math.floor(i / n), i % n];
        if (there[from] === 0) continue;
        if (anyEntry(phase.fates, i, model)) next[to] = 1;
        if (anyEntry(phase.births, i, model)) next[to] = born[to] = 1;
      }
      return next;
    case 'count':
    case 'survival':
    case 'dispersal':
    case 'ceiling':
    case 'take':
    case 'move':
      return there;
    case 'add':
      return there.map((present, c) => Math.max(present, phase.classes[c] ?? 0));
  }
}

function anyEntry(table: RateTable, i: number, model: Model): boolean {
  const size = model.classes.length * model.classes.length;
  return table.epochs.some((epoch) => model.patches.some((_, p) => (epoch[p * size + i] ?? 0) > 0));
}
