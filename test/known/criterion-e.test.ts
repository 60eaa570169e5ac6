// Windows of criterion E of the IUCN Red List (2012, version 3.1; thresholds from memory), and what a run says of them.
import { expect, test } from 'vitest';
import { criterionE, criterionWindows, withCriterionE } from '../../src/analysis/criterion-e.ts';
import { runModel } from '../../src/pipeline.ts';
import { criterionWords } from '../../src/report/criterion-words.ts';
import { reportOf } from '../page/report-of.ts';
import { withoutScripts } from '../page/without-scripts.ts';
import { compileText } from '../pipeline/compile-text.ts';
import { framed } from '../pipeline/frame.ts';

test.each([
  [2, [10, 20, 100]],
  [4, [12, 20, 100]],
  [10, [30, 50, 100]],
  [25, [75, 100, 100]],
  [40, [100, 100, 100]],
])('a generation of %d years has the windows %j', (generation, years) => {
  const windows = criterionWindows(generation);
  expect(windows.map((one) => one.years)).toEqual(years);
  expect(windows.map((one) => one.chance)).toEqual([0.5, 0.2, 0.1]);
});

/** Young are born once a year and all animals live on with the same survival: a generation of 1 / (1 − 0.6) years or so. */
const text = (outcome: string, years = 40): string =>
  framed(
    `classes: [young, adult]
oldest: open-ended
survival: { young: 0.4, adult: 0.6 }
births: { adult: 0.7 }
year: [count, breeding, survival, ageing]
start: { table: { Meadow: { adult: 12 } } }
outcomes: { gone: ${outcome} }
run: { replicates: 400, seed: 3 }
`,
    { years },
  );

test('a run says what its chances are consistent with, and where it looks less far ahead', () => {
  const compiled = compileText(text('{ of: all, below: 1 }'));
  const results = runModel(compiled);
  const found = criterionE(compiled, results)!;
  expect(found.generationLength).toBeGreaterThan(1);
  expect(found.windows.map(({ says }) => says)).toEqual([
    'not consistent with',
    'consistent with',
    'looks less far ahead',
  ]);
  const [first] = found.windows;
  expect(first!.found!.probability).toBe(results.outcomes[0]!.byYear[first!.years - 1]!.ever);
  const words = criterionWords({ criterionE: found }).join(' ');
  expect(words).toContain('consistent with the threshold of Endangered');
  expect(words).not.toMatch(/is listed as (?:Critically|Endangered|Vulnerable)/u);
});

/** What the report page holds but for its data and script. */
function bodyOf(spec: string): string {
  const compiled = compileText(spec);
  const html = reportOf(compiled, { results: withCriterionE(compiled, runModel(compiled)) });
  return withoutScripts(html.slice(html.indexOf('<body>')));
}

test('the report page says the same, as text, and names no listing', () => {
  const nasty = '</p><img src=x onerror=alert(1)>';
  const spec = text('{ of: all, below: 1 }').replace('gone:', `'${nasty}':`);
  const body = bodyOf(spec);
  const part = /<section id="criterion-e".*?<\/section>/su.exec(body)?.[0] ?? '';
  const compiled = compileText(spec);
  const words = criterionWords(withCriterionE(compiled, runModel(compiled)));
  const shown = part
    .replace(/<[^>]*>/gu, ' ')
    .replaceAll('&lt;', '<')
    .replaceAll('&gt;', '>');
  expect(words).toHaveLength(5);
  for (const one of words) expect(shown).toContain(one.replace(/^- /u, ''));
  expect(part).toContain('consistent with the threshold of Endangered');
  expect(part).toContain('&lt;/p&gt;&lt;img src=x onerror=alert(1)&gt;');
  expect(part).not.toContain('<img');
  expect(part).not.toMatch(/\b(?:is|are|as|listed) (?:Critically|Endangered|Vulnerable)/u);
  expect(body).toContain('<a href="#criterion-e">');
});

test('a page without such an outcome has no such part', () => {
  expect(bodyOf(text('{ of: [adult], below: 1 }'))).not.toMatch(/criterion/iu);
});

test('other outcomes are no extinction', () => {
  for (const outcome of ['{ of: [adult], below: 1 }', '{ of: all, below: 5 }', '{ of: all, below: 1, for: 3 years }']) {
    const compiled = compileText(text(outcome));
    expect(criterionE(compiled, runModel(compiled))).toBeNull();
  }
});
