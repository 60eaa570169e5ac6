import { describe, expect, it } from 'vitest';
import * as layout from '../../assembly/layout.ts';
import { aliasTable } from '../../src/compile/image/alias.ts';
import { keyOfName, keysOfNames } from '../../src/compile/image/keys.ts';
import { describeImage } from '../../src/compile/image/describe.ts';
import { headerOf, readNames, readSections } from '../../src/compile/image/read.ts';
import { openImage } from '../../src/kernel/open.ts';
import { runPath } from '../../src/kernel/path.ts';
import { everywhere, imageOf, movement } from './models.ts';

const image = () =>
  imageOf({
    patches: ['east', 'west'],
    classes: ['a', 'b'],
    start: [1, 2, 3, 4],
    phases: [{ kind: 'survival', name: 'survival', survival: everywhere(2, [0.5, 0.25]) }],
  });

function faultAfter(change: (words: Int32Array, bytes: ArrayBuffer) => void): string {
  const bytes = image();
  change(new Int32Array(bytes), bytes);
  const opened = openImage(bytes);
  return opened.ok ? 'none' : `${opened.fault.code}: ${opened.fault.message}`;
}

describe('an image', () => {
  it('opens as it was built', () => {
    expect(faultAfter(() => undefined)).toBe('none');
  });

  it('is refused with the reason where this kernel cannot run it', () => {
    expect(faultAfter((words) => (words[layout.headerMagic] = 7))).toBe(
      'not-an-image: These bytes are not a compiled model.',
    );
    expect(faultAfter((words) => (words[layout.headerMajor] = 9))).toBe(
      'other-version: The compiled model has version 9; this kernel runs version 1.',
    );
    expect(faultAfter((words) => (words[layout.headerSize] = 16))).toMatch(/^damaged: /);
    const firstOffset = layout.headerBytes / 4 + layout.rowOffset;
    expect(faultAfter((words) => (words[firstOffset] = 1 << 20))).toMatch(/^damaged: /);
    expect(faultAfter((words) => (words[layout.headerStart] = 99))).toMatch(/^damaged: /);
    expect(faultAfter((words) => (words[layout.headerSections] = 1 << 20))).toMatch(/^damaged: /);
    expect(faultAfter((words) => (words[layout.headerBytes / 4] = 99))).toBe(
      'unknown-kind: The compiled model has a section of unknown kind 99.',
    );
    expect(
      faultAfter((words, bytes) => {
        const program = readSections(bytes).find(({ kind }) => kind === layout.kindPhaseProgram);
        words[(program?.offset ?? 0) / 4] = 77;
      }),
    ).toBe('unknown-opcode: The compiled model has a record with unknown opcode 77.');
    expect(openImage(new ArrayBuffer(16)).ok).toBe(false);
  });

  it('keeps every section on sixteen bytes and the names for messages', () => {
    expect(readSections(image()).every(({ offset }) => offset % 16 === 0)).toBe(true);
    expect(readNames(image())).toMatchObject({
      patches: ['east', 'west'],
      classes: ['a', 'b'],
      phases: ['survival', 'count'],
    });
    expect(headerOf(image())[layout.headerSize]).toBe(image().byteLength);
  });
});

describe('keys of names', () => {
  // FNV-1a (Fowler, Noll & Vo) and the finaliser of MurmurHash3 (Appleby): fixed here so that no release changes the luck.
  it('never change', () => {
    expect([keyOfName(''), keyOfName('patch:east'), keyOfName('patch:Übersee')]).toEqual([
      2872998923, 3863059619, 2347763219,
    ]);
  });

  it('are the same for any order of the names, and differ by kind', () => {
    const [a, b] = keysOfNames('patch', ['east', 'west']);
    expect([...keysOfNames('patch', ['west', 'east'])]).toEqual([b, a]);
    expect(keysOfNames('class', ['east'])[0]).not.toBe(a);
  });

  it('stay apart, in a fixed way, where two names meet in one hash', () => {
    const meets = (name: string) => (name === 'patch:east' || name === 'patch:west' ? 5 : keyOfName(name) >>> 0);
    const [west, east] = keysOfNames('patch', ['west', 'east'], meets);
    expect(east).toBe(5);
    expect((west ?? 0) >>> 0).toBe(keyOfName('patch:west:1'));
  });
});

describe('an alias table', () => {
  it.each([[[1]], [[0.5, 0.5]], [[0.1, 0.2, 0.3, 0.4]], [[0.97, 0.01, 0.01, 0.01]], [[0, 1, 0]]])(
    'gives back the chances %j',
    (chances) => {
      const ends = chances.map((_, i) => i);
      const { keep, first, second } = aliasTable(ends, chances);
      const found = chances.map(() => 0);
      keep.forEach((share, column) => {
        found[first[column]!]! += share / chances.length;
        found[second[column]!]! += (1 - share) / chances.length;
      });
      found.forEach((chance, i) => expect(chance).toBeCloseTo(chances[i]!, 14));
    },
  );
});

describe('the path without chance', () => {
  it('takes the means of the phases one after the other', () => {
    const path = runPath(
      imageOf({
        patches: ['east', 'west'],
        classes: ['a', 'b'],
        start: [10, 20, 0, 5],
        phases: [
          { kind: 'breeding', name: 'breeding', births: everywhere(2, [0, 1.5]), into: Float64Array.of(0.5, 0.5) },
          { kind: 'survival', name: 'survival', survival: everywhere(2, [0.5, 0.8]) },
          {
            kind: 'dispersal',
            name: 'natal',
            moves: Uint8Array.of(1, 0),
            leaving: everywhere(2, [0.25, 0]),
            rule: { by: 'shares', shares: new Float64Array() },
          },
          { kind: 'ageing', name: 'ageing', advance: Float64Array.of(1, 0), next: Int32Array.of(1, -1) },
          { kind: 'ceiling', name: 'room', counted: Uint8Array.of(1, 1), capacity: Float64Array.of(30, 30) },
        ],
        movements: [null, null, movement(2, [[0, 1, 0.8]]), null, null],
      }),
      { steps: 1 },
    );
    // derived by hand. East: 10 + 15 young and 35 adults; 12.5 and 28; 3.125 leave, 2.5 of them arrive; 37.375, cut to 30.
    // West: 3.75 and 8.75; 1.875 and 7; a quarter of the young leaves and dies since no way leads out.
    const west = 1.875 * 0.75 + 2.5 + 7;
    expect(Array.from(path.animals)).toEqual([10, 20, 0, 5, 0, 30, 0, west]);
  });
});

describe('the printed image', () => {
  it('says every record and section in words', () => {
    expect(describeImage(image())).toMatchInlineSnapshot(`
      "image version 1.0, 864 bytes
      2 patches, 2 classes, 10 steps

      year program
      phase program
        survival "survival" key 24c5d480: rates 4, slots -
        count "count" key af67dcac: weights 5, patches 6, outcomes 0, rules -

      sections
        0 patch keys at 544 (2 in 2): e6419ca3 f695dc63
        1 class keys at 560 (2 in 2): a7f8ff18 71a67ba7
        2 start animals at 576 (4 in 4): 1 2 3 4
        3 year program at 592 (0 in 16)
        4 rates at 592 (4 in 4): 0.5 0.25 0.5 0.25
        5 outcome weights at 624 (0 in 0)
        6 outcome patches at 624 (0 in 0)
        7 phase program at 624 (32 in 16)
      "
    `);
  });
});
