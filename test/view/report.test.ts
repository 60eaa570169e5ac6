// The report as text, before any browser: what must stand in it, and what it must own up to.
import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { buildReport, type ReportInput } from '../../src/report/report.ts';
import { fixture } from '../page/fixture.ts';

const input = fixture({ pageScript: 'console.log("</script>")' });
const html = buildReport(input);
const words = (page: string) => page.replace(/<[^>]*>/g, ' ').replace(/\s+/g, ' ');

describe('the report', () => {
  it('is the same, byte for byte, from the same input, and light', () => {
    expect(buildReport(input)).toBe(html);
    expect(html.length).toBeLessThan(500_000);
  });

  it('holds the seven ODD headings, exactly and in order (Grimm et al. 2020)', () => {
    const headings = [...html.matchAll(/<h4>(\d\. [^<]*)<\/h4>/g)].map((match) => match[1]);
    expect(headings).toEqual([
      '1. Purpose and patterns',
      '2. Entities, state variables, and scales',
      '3. Process overview and scheduling',
      '4. Design concepts',
      '5. Initialization',
      '6. Input data',
      '7. Submodels',
    ]);
  });

  it('lists every named number with its basis and source, and counts what is assumed', () => {
    const text = words(html);
    for (const { name } of input.model.parameters) expect(text).toContain(` ${name} `);
    expect(text).toContain('1 of 4 named numbers is assumed: 1 measured here, 1 measured elsewhere, 1 without a word');
    expect(text).toContain('radio-tracking 2019-2024, 61 hares');
  });

  it('names both intervals beside every chance, and the bound where nothing happened', () => {
    const text = words(html);
    expect(text.match(/no uncertainty was given/g)).toHaveLength(2 * input.results.outcomes.length);
    expect(text).toMatch(/being below in 2076 0 % no case; at most 0\.19 % \(95 %\)/);
  });

  it('carries the cautions: ranking, horizon, what is left out, movement, correlation, permits', () => {
    const text = words(html);
    for (const said of [
      'Rank plans',
      '50 years ahead',
      'disease, inbreeding',
      'strike all patches together',
      'IUCN/SSC (2013)',
    ]) {
      expect(text).toContain(said);
    }
  });

  it('says how to run it again: command, seed, whole hash, versions and the text of the model', () => {
    for (const said of [input.commandLine, input.results.hash, 'skein 0.1.0, kernel 1', 'title: Reed hare']) {
      expect(html).toContain(said);
    }
  });

  it('lets run only the script and the style whose hashes it names', () => {
    const [, script = ''] = /<script>([^]*?)<\/script>/.exec(html) ?? [];
    const [, style = ''] = /<style>([^]*?)<\/style>/.exec(html) ?? [];
    const [, policy = ''] = /http-equiv="Content-Security-Policy" content="([^"]*)"/.exec(html) ?? [];
    const hash = (text: string) => `'sha256-${createHash('sha256').update(text).digest('base64')}'`;
    expect(script).toBe('console.log("<\\/script>")');
    expect(policy).toBe(
      `default-src 'none'; script-src ${hash(script)}; style-src ${hash(style)}; img-src data: blob:; base-uri 'none'; form-action 'none'`,
    );
    expect(html).not.toMatch(/ style="| on\w+="|<link|@import|url\(/);
  });

  it('says so where places are only a scheme and where movement is not known', () => {
    const bare = words(buildReport(fixture({ places: false, movement: false })));
    expect(bare).toContain('they stand in a ring in the order of the model');
    expect(bare).toContain('No movement is drawn.');
    expect(words(html)).toContain('Patches stand where they are');
  });

  it('tells of runs that had to be stopped', () => {
    const stopped: ReportInput = {
      ...input,
      results: { ...input.results, stopped: { runs: 3, reasons: ['more than 1e9 animals'] } },
    };
    expect(words(buildReport(stopped))).toContain(
      'runs that had to be stopped 3, which are in no other number here: more than 1e9 animals',
    );
  });

  it('shows the interval from what is not known where there is one', () => {
    const [first, ...others] = input.results.outcomes;
    const unknown = {
      lower: 0.01,
      upper: 0.2,
      level: 0.95,
      method: 'quantiles of draws',
      from: 'what is not known',
    } as const;
    const outcome = { ...first!, ever: { ...first!.ever, intervalFromUnknown: unknown } };
    const text = words(buildReport({ ...input, results: { ...input.results, outcomes: [outcome, ...others] } }));
    expect(text).toContain('From what is not known about the numbers of the model, it lies between 1.0 % and 20.0 %');
    expect(text).not.toContain('is in none of the intervals here');
  });

  it('answers with abundance where no outcome is named', () => {
    const text = words(
      buildReport({ ...input, model: { ...input.model, outcomes: [] }, results: { ...input.results, outcomes: [] } }),
    );
    expect(text).toContain('No outcome was named in this model. The middle future ends with');
    expect(text).not.toContain('Chances by year');
  });
});
