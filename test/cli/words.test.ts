// A command line that is wrong ends with 2, says what was expected, and does nothing.
import { describe, expect, test } from 'vitest';
import { filesIn, folder, hare, ponds, skein } from './skein.ts';

interface Wrong {
  readonly words: readonly string[];
  readonly told: RegExp;
}

const wrong: readonly Wrong[] = [
  { words: ['chek', ponds], told: /unknown command 'chek'[^]*Did you mean check\?/ },
  { words: ['run', ponds, '--replicate', '5'], told: /unknown option '--replicate'[^]*Did you mean --replicates\?/ },
  { words: ['check'], told: /missing required argument 'model'/ },
  { words: ['run', ponds, ponds], told: /too many arguments/ },
  { words: ['report', ponds], told: /required option '-o, --output <file>'/ },
  { words: ['run', ponds, '--seed'], told: /argument missing/ },
  { words: ['run', ponds, '--seed', '1.5'], told: /'1\.5' is invalid\. It takes a whole number from 0/ },
  { words: ['run', ponds, '--seed=-3'], told: /'-3' is invalid/ },
  { words: ['run', ponds, '--seed', '9007199254740992'], told: /whole number from 0 to 9007199254740991/ },
  { words: ['run', ponds, '--replicates', '0'], told: /'0' is invalid\. It takes a whole number from 1/ },
  { words: ['run', ponds, '--years', '1e3'], told: /'1e3' is invalid/ },
  { words: ['run', ponds, '--years', '100001'], told: /whole number from 1 to 100000/ },
  { words: ['run', hare, '--set', 'litter'], told: /Write it as name=value/ },
  { words: ['run', hare, '--set', 'liter=3'], told: /no parameter `liter`\. Did you mean `litter`\?/ },
  {
    words: ['show', ponds, 'matrices'],
    told: /no stage `matrices`\. There are: spec, model, landscape, matrix, packed/,
  },
  { words: ['new', 'here', '--example', 'two-pond'], told: /no example `two-pond`\. There are: .*two-ponds/ },
];

describe('a mistake in the command line', () => {
  test.each(wrong)('skein $words', ({ words, told }) => {
    const cwd = folder();
    const { code, out, err } = skein(words, { cwd });
    expect({ code, out }).toEqual({ code: 2, out: '' });
    expect(err).toMatch(told);
    expect(err).not.toMatch(/^\s+at /m);
    expect(filesIn(cwd)).toEqual([]);
  });
});
