// The terminal text of a run.
import { describe, expect, it } from 'vitest';
import { pathText } from '../../src/report/path-text.ts';
import { sparkLine } from '../../src/report/spark-line.ts';
import { runText } from '../../src/report/text.ts';
import { fixture } from '../page/fixture.ts';

const input = fixture();

describe('the text of a run', () => {
  const text = runText(input.results, { colour: false, width: 80, animals: 'females' });

  it('leads with the answer in words, with both intervals and whose call it is', () => {
    const [title, lead, meaning] = text.split('\n\n');
    expect(title).toBe('Reed hare on the Harrow Levels');
    expect(lead).toBe('In about 4 of 100 futures “few hares” happens by 2076.');
    expect(meaning).toContain('means: fewer than 40 adult');
    expect(text).toContain('From the number of runs alone (2,000 runs), the chance lies between');
    expect(text).toContain('The model gives no uncertainty for its numbers');
    expect(text).toContain('it is for those who\ndecide');
  });

  it('never shows a chance of nothing without its upper bound', () => {
    expect(text).toMatch(/north empty: being below in 2076 +0 % +at most 0\.19 %/);
  });

  it('keeps within the width and needs no colour', () => {
    for (const width of [60, 80, 100]) {
      const lines = runText(input.results, { colour: false, width, animals: 'females' }).split('\n');
      expect(Math.max(...lines.map((line) => [...line].length))).toBeLessThanOrEqual(width);
    }
    expect(text).not.toContain('\u001b');
    const coloured = runText(input.results, { colour: true, width: 80, animals: 'females' });
    expect(coloured.replace(/\u001b\[\d+m/g, '')).toBe(text);
  });

  it('passes on no control codes from names', () => {
    const results = { ...input.results, model: 'x\u001b[31mred\u202e', outcomes: [] };
    const plainText = runText(results, { colour: false, width: 80 });
    expect(plainText).toContain('x\uFFFD[31mred\uFFFD');
    expect(plainText).toContain('No outcome was named in this model.');
  });
});

describe('the text of a path', () => {
  it('says where it starts and ends, in all and by patch', () => {
    const path = input.path;
    if (path === undefined) throw new Error('the fixture has a path');
    const text = pathText(path, { colour: false, width: 80, animals: 'females' });
    expect(text).toContain('Without chance, 80 females at the start become 80 by 2076.');
    expect(text).toMatch(/North fen +10 +10 +█+/);
    expect(text).toMatch(/all patches +80 +80 +█+/);
  });
});

describe('the course in one line', () => {
  it('rises from the ground to the largest', () => {
    expect(sparkLine([0, 1, 2, 4, 8], 10)).toBe('·▂▃▅█');
    expect(sparkLine([], 10)).toBe('·');
    expect(
      sparkLine(
        Array.from({ length: 500 }, (_, i) => i),
        40,
      ),
    ).toHaveLength(40);
  });
});
