// What the weather of two images is drawn from: where it is the same, the same replicates meet the same weather under both.
import * as layout from '../../../assembly/layout.ts';
import { headerOf, readSections, type PackedSection } from './read.ts';

/** Of records of the year program: operands that name sections which the lasting numbers are drawn from, and plain ones. */
const drawnFrom: ReadonlyMap<number, readonly Operand[]> = new Map([
  [
    layout.opVariation,
    [
      { word: layout.variationPatchColumns, rows: 1 },
      { word: layout.variationRateColumns, rows: 1 },
      { word: layout.variationCarry, rows: 1 },
      { word: layout.variationWeather, rows: 0 },
    ],
  ],
  [
    layout.opCatastrophe,
    [
      { word: layout.strikeChance, rows: 1 },
      { word: layout.strikeOrigins, rows: 1 },
      { word: layout.strikeReach, rows: 2 },
      { word: layout.strikeColumn, rows: 1 },
      { word: layout.strikeWeather, rows: 0 },
      { word: layout.strikeOver, rows: 0 },
    ],
  ],
  // Nothing of these lasts: they are worked out anew in every step of every image.
  [layout.opResponse, []],
  [layout.opDrivers, []],
]);

interface Operand {
  readonly word: number;
  /** Sections that it names, one row after the other; 0 for a plain number. */
  readonly rows: number;
}

/** Numbers of one replicate that last from year to year. */
export function weatherNumbersOf(image: ArrayBuffer): number {
  return headerOf(image)[layout.headerWeather] ?? 0;
}

/** Everything that the lasting numbers of the weather depend on beside seed, replicate and step, as text: equal texts, equal weather. */
export function weatherSource(image: ArrayBuffer): string {
  const header = headerOf(image);
  const sections = readSections(image);
  const wordsOf = (row: number): string => textOf(sections[row]);
  const program = sections[header[layout.headerYearProgram] ?? -1]?.data ?? [];
  const parts = [String(weatherNumbersOf(image)), wordsOf(header[layout.headerPatchKeys] ?? -1)];
  for (let at = 0; at < program.length; at += layout.recordWords) {
    const word = (i: number): number => program[at + i] ?? layout.none;
    const opcode = word(layout.recordOpcode);
    const operands = drawnFrom.get(opcode);
    if (operands === undefined) throw new Error(`What lasts of the condition ${opcode} is not known.`);
    for (const { word: operand, rows } of operands) {
      const value = word(operand);
      const own =
        rows === 0 ? String(value) : Array.from({ length: rows }, (_, k) => (value < 0 ? '' : wordsOf(value + k)));
      parts.push(`${String(opcode)} ${String(word(layout.recordKey))} ${String(operand)} ${[own].flat().join(' / ')}`);
    }
  }
  return parts.join('\n');
}

function textOf(section: PackedSection | undefined): string {
  return section === undefined ? '' : Array.from(section.data).join(' ');
}
