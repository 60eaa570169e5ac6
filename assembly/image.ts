// The open image: its header, and where its sections stand in memory. What each number means is said in layout.ts.
import { i32At } from './arrays';
import * as layout from './layout';

export let patches: i32 = 0;
export let classes: i32 = 0;
export let steps: i32 = 0;
export let slots: i32 = 0;
export let columns: i32 = 0;
export let ways: i32 = 0;
export let patchKeys: usize = 0;
export let classKeys: usize = 0;
/** What a fault is about: a kind, an opcode, a version. */
export let faultDetail: i32 = 0;

let image: usize = 0;

/** Takes the image at this address; a fault code where this kernel cannot run it. */
export function openImage(address: usize, size: i32): i32 {
  image = address;
  const fault = firstFault(size);
  if (fault !== layout.faultNone) return fault;
  patches = header(layout.headerPatches);
  classes = header(layout.headerClasses);
  steps = header(layout.headerSteps);
  slots = header(layout.headerSlots);
  columns = header(layout.headerColumns);
  ways = header(layout.headerWays);
  patchKeys = section(header(layout.headerPatchKeys));
  classKeys = section(header(layout.headerClassKeys));
  return layout.faultNone;
}

export function header(word: i32): i32 {
  return i32At(image, word);
}

function directory(row: i32, word: i32): i32 {
  return i32At(image + layout.headerBytes + row * layout.rowBytes, word);
}

/** Address of a section; 0 for none. */
export function section(row: i32): usize {
  return row < 0 ? 0 : image + directory(row, layout.rowOffset);
}

export function entries(row: i32): i32 {
  return row < 0 ? 0 : directory(row, layout.rowCount);
}

/** Address of the part of a section that holds in a step (1-based). */
export function sectionAt(row: i32, step: i32): usize {
  if (row < 0) return 0;
  const epochRow = directory(row, layout.rowEpochOf);
  if (epochRow < 0) return section(row);
  const epoch = i32At(section(epochRow), step - 1);
  const bytes = directory(row, layout.rowType) === layout.typeF64 ? 8 : 4;
  return section(row) + epoch * directory(row, layout.rowColumns) * bytes;
}

export function operand(record: usize, word: i32): i32 {
  return i32At(record, word);
}

function fault(code: i32, detail: i32): i32 {
  faultDetail = detail;
  return code;
}

function firstFault(size: i32): i32 {
  if (size < layout.headerBytes) return fault(layout.faultSize, size);
  if (header(layout.headerMagic) !== layout.imageMagic) return fault(layout.faultMagic, header(layout.headerMagic));
  if (header(layout.headerMajor) !== layout.imageMajor) return fault(layout.faultMajor, header(layout.headerMajor));
  const rows = header(layout.headerSections);
  const room = (size - layout.headerBytes) / layout.rowBytes;
  if (header(layout.headerSize) !== size || rows < 0 || rows > room) return fault(layout.faultSize, size);
  for (let row = 0; row < rows; row++) {
    const kind = directory(row, layout.rowKind);
    if (!isKind(kind)) return fault(layout.faultKind, kind);
    if (!fits(row, size)) return fault(layout.faultSize, size);
  }
  for (let word = layout.headerYearProgram; word <= layout.headerStart; word++) {
    if (<u32>header(word) >= <u32>rows) return fault(layout.faultSize, size);
  }
  const inYear = firstUnknown(header(layout.headerYearProgram));
  if (inYear !== 0) return fault(layout.faultOpcode, inYear);
  const inPhases = firstUnknown(header(layout.headerPhaseProgram));
  return inPhases !== 0 ? fault(layout.faultOpcode, inPhases) : layout.faultNone;
}

function isKind(kind: i32): bool {
  if (kind >= layout.firstChanceKind && kind <= layout.lastChanceKind) return true;
  return kind >= 1 && kind <= layout.highestKind;
}

function isOpcode(opcode: i32): bool {
  if (opcode >= layout.opVariation && opcode <= layout.opDrivers) return true;
  if (opcode >= layout.opTake && opcode <= layout.opAdd) return true;
  return (opcode >= layout.opBreeding && opcode <= layout.opCrowding) || opcode === layout.opCount;
}

/** Whether a section stands within the image, on its alignment. */
function fits(row: i32, size: i32): bool {
  const type = directory(row, layout.rowType);
  const bytes: u64 = type === layout.typeF64 ? 8 : type === layout.typeI32 ? 4 : 1;
  const offset = <u32>directory(row, layout.rowOffset);
  const end = u64(offset) + u64(<u32>directory(row, layout.rowCount)) * bytes;
  return offset % layout.sectionAlignment === 0 && end <= u64(size);
}

function firstUnknown(program: i32): i32 {
  const end = section(program) + ((<usize>entries(program)) << 2);
  for (let record = section(program); record < end; record += layout.recordBytes) {
    const opcode = operand(record, layout.recordOpcode);
    if (!isOpcode(opcode)) return opcode;
  }
  return 0;
}
