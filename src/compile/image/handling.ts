// The records of takes, moves and releases, and the columns in which they report.
import * as layout from '../../../assembly/layout.ts';
import type { AddPhase, Model, MovePhase, Phase, TakePhase } from '../../model/model.ts';
import { firstHandledColumn } from './count.ts';
import type { PhasePlace } from './place.ts';
import { record } from './record.ts';
import { plain } from './section.ts';
import { addTable } from './table.ts';

type HandlingPhase = TakePhase | MovePhase | AddPhase;

export function isHandling(phase: Phase): phase is HandlingPhase {
  return phase.kind === 'take' || phase.kind === 'move' || phase.kind === 'add';
}

/** How many columns these phases fill, up to (not with) a phase. */
export function handledColumns({ phases }: Pick<Model, 'phases'>, until = phases.length): number {
  return phases.slice(0, until).filter(isHandling).length * layout.handledColumns;
}

const opcodes = { take: layout.opTake, move: layout.opMove, add: layout.opAdd } as const;
const rules = { number: layout.ruleNumber, share: layout.ruleShare, excess: layout.ruleExcess } as const;

export function handlingRecord(phase: HandlingPhase, { list, model, index, key }: PhasePlace): Int32Array {
  const { name, active } = phase;
  const quota = phase.kind === 'add' ? null : phase;
  const survival = phase.kind === 'take' ? null : phase.survival;
  const homing = phase.kind === 'move' ? phase.homing : 0;
  return record(opcodes[phase.kind], key, index, [
    active === null ? layout.none : list.add(plain(layout.kindEpochOf, active, `years of ${name}`)),
    firstHandledColumn(model) + handledColumns(model, index),
    list.add(plain(layout.kindPatchForms, Int32Array.from(phase.patches), `patches of ${name}`)),
    list.add(plain(layout.kindClassMask, Int32Array.from(phase.classes), `classes of ${name}`)),
    addTable(list, layout.kindRates, phase.amounts, `amounts of ${name}`),
    quota === null ? layout.none : rules[quota.rule],
    quota?.together === true ? 1 : 0,
    quota?.byClass === true ? 1 : 0,
    quota === null ? layout.none : list.add(plain(layout.kindPatchNumbers, quota.levels, `levels of ${name}`)),
    phase.kind === 'move' ? phase.to : layout.none,
    survival === null ? layout.none : list.add(plain(layout.kindClassWeights, survival, `survival of ${name}`)),
    homing === 0 ? layout.none : list.add(plain(layout.kindPatchNumbers, Float64Array.of(homing), `homing of ${name}`)),
  ]);
}
