// The key beneath a figure: its words find room, in more than one line where they must.
import { expect, it } from 'vitest';
import { key } from '../../src/view/key.ts';
import { mark } from '../../src/view/markup.ts';

const entry = (words: string, width = 100) => ({ sample: mark`<rect/>`, width, words });
const textsOf = (text: string) => [...text.matchAll(/<text [^>]*>([^<]*)<\/text>/g)].map((match) => match[1]);

it('breaks words that are too long for the figure, and what follows stands below them', () => {
  const long = entry('the middle, from nothing to the most in 95 of 100 futures');
  const { markup, height } = key([long, entry('dots', 10)], 0, 0, 336);
  expect(textsOf(markup.text)).toEqual(['the middle, from nothing to the most in', '95 of 100 futures', 'dots']);
  expect([...markup.text.matchAll(/translate\(([\d. ]+)\)/g)].map((match) => match[1])).toEqual(['0 12', '0 52']);
  expect(height).toBe(64);
});

it('keeps entries side by side where there is room, and has no height where there are none', () => {
  const { markup, height } = key([entry('one'), entry('two')], 2, 4, 700);
  expect([height, textsOf(markup.text)]).toEqual([24, ['one', 'two']]);
  expect(key([], 0, 0, 340).height).toBe(0);
});
