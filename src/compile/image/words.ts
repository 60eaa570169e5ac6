// The words by which kinds, opcodes and operands of an image are printed.
import * as layout from '../../../assembly/layout.ts';

const kinds: readonly (readonly [number, string])[] = [
  [layout.kindPatchKeys, 'patch keys'],
  [layout.kindClassKeys, 'class keys'],
  [layout.kindStartAnimals, 'start animals'],
  [layout.kindYearProgram, 'year program'],
  [layout.kindPhaseProgram, 'phase program'],
  [layout.kindEpochOf, 'epoch of step'],
  [layout.kindRates, 'rates'],
  [layout.kindClassShares, 'class shares'],
  [layout.kindClassLinks, 'class links'],
  [layout.kindClassMask, 'class mask'],
  [layout.kindPatchMatrices, 'patch matrices'],
  [layout.kindMovement, 'movement'],
  [layout.kindMovementStart, 'movement start'],
  [layout.kindMovementTo, 'movement to'],
  [layout.kindMovementChance, 'movement chance'],
  [layout.kindMovementOnward, 'movement onward'],
  [layout.kindAliasStart, 'alias start'],
  [layout.kindAliasKeep, 'alias keep'],
  [layout.kindAliasEnds, 'alias ends'],
  [layout.kindPatchNumbers, 'patch numbers'],
  [layout.kindPatchForms, 'patch forms'],
  [layout.kindClassWeights, 'class weights'],
  [layout.kindSlotLists, 'slot lists'],
  [layout.kindOutcomeWeights, 'outcome weights'],
  [layout.kindOutcomePatches, 'outcome patches'],
  [layout.kindNames, 'names'],
  [layout.kindOutcomeRules, 'outcome rules'],
  [layout.kindColumnKeys, 'column keys'],
  [layout.kindFactorStart, 'factor start'],
  [layout.kindFactorColumn, 'factor column'],
  [layout.kindFactorWeight, 'factor weight'],
  [layout.kindCarry, 'carried over'],
  [layout.kindQuantities, 'quantities'],
  [layout.kindDistributions, 'distributions'],
  [layout.kindQuantileTables, 'quantile tables'],
  [layout.kindExpression, 'expression'],
  [layout.kindConstants, 'constants'],
  [layout.kindStrike, 'strike'],
  [layout.kindPatchList, 'patch list'],
  [layout.kindSlotNumbers, 'slot numbers'],
];

const handled = [
  'active',
  'first column',
  'patches',
  'classes',
  'amounts',
  'rule',
  'together',
  'by class',
  'levels',
  'to',
  'survival',
  'homing',
];

/** For each opcode its word, then the words of its operands in order. */
const opcodes: readonly (readonly [number, readonly string[]])[] = [
  [
    layout.opBreeding,
    [
      'breeding',
      'births',
      'into',
      'onward',
      'slots',
      'waiting',
      'places',
      'offspring',
      'litters',
      'litter means',
      'mating',
      'sexes',
      'per male',
      'room',
    ],
  ],
  [layout.opSurvival, ['survival', 'rates', 'slots']],
  [layout.opAgeing, ['ageing', 'advance', 'next', 'by patch']],
  [layout.opDemography, ['demography', 'fates', 'births', 'fate slots', 'birth slots']],
  [layout.opDispersal, ['dispersal', 'moves', 'leaving', 'movement', 'ways before', 'slots']],
  [layout.opCeiling, ['ceiling', 'counted', 'capacity', 'takes', 'room']],
  [layout.opCrowding, ['crowding', 'weights', 'forms', 'coefficients', 'allee half', 'slot number', 'shape', 'room']],
  [
    layout.opVariation,
    [
      'variation',
      'patch columns',
      'patch factor',
      'rate columns',
      'rate factor',
      'carry',
      'quantities',
      'tables',
      'weather',
    ],
  ],
  [
    layout.opResponse,
    ['response', 'expression', 'constants', 'attributes', 'years', 'base', 'slot number', 'bounds', 'patches'],
  ],
  [
    layout.opCatastrophe,
    [
      'catastrophe',
      'numbers',
      'origins',
      'reach',
      'slots',
      'values',
      'means',
      'weather',
      'over',
      'column',
      'capacity slots',
    ],
  ],
  [layout.opDrivers, ['drivers', 'values', 'slots', 'column']],
  [layout.opTake, ['take', ...handled]],
  [layout.opMove, ['move', ...handled]],
  [layout.opAdd, ['add', ...handled]],
  [layout.opCount, ['count', 'weights', 'patches', 'outcomes', 'rules']],
];

const kindWords = new Map(kinds);
const opcodeWords = new Map(opcodes);

export function kindWord(kind: number): string {
  return kindWords.get(kind) ?? `unknown kind ${String(kind)}`;
}

export function opcodeWord(opcode: number): string {
  return opcodeWords.get(opcode)?.[0] ?? `unknown opcode ${String(opcode)}`;
}

export function operandWords(opcode: number): readonly string[] {
  return opcodeWords.get(opcode)?.slice(1) ?? [];
}
