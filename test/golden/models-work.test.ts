// Every model that comes with the tool checks without a warning, runs, and reports.
import { describe, expect, test } from 'vitest';
import { followPath, runModel } from '../../src/pipeline.ts';
import { buildReport } from '../../src/report/report.ts';
import { pathText } from '../../src/report/path-text.ts';
import { runText } from '../../src/report/text.ts';
import { tryText } from '../pipeline/compile-text.ts';
import { compileModel, modelFiles, modelNames, modelText } from './models.ts';

describe.each(modelNames)('%s', (name) => {
  const compiled = compileModel(name, { replicates: 32 });
  const [results, path] = [runModel(compiled), followPath(compiled)];

  test('has no error and no warning', () => {
    expect(tryText(modelText(name), {}, modelFiles(name)).diagnostics.filter((one) => one.severity !== 'note')).toEqual([]);
  });

  test('says that it is invented', () => {
    expect(compiled.model.invented).toBe(true);
    expect(modelText(name)).toMatch(/everything in it is invented/i);
  });

  test('runs: every number is finite, from the start over all years', () => {
    const { whole, patches } = results.abundance;
    expect(whole).toHaveLength(compiled.model.steps + 1);
    expect(whole[0]?.mean).toBe(compiled.startAnimals.reduce((sum, value) => sum + value, 0));
    expect(patches).toHaveLength(compiled.model.patches.length);
    expect(results.stopped.runs).toBe(0);
    expect(everyNumber(JSON.stringify([results, path]))).toBe(true);
    expect(path.abundance.every(({ animals }) => Number.isFinite(animals) && animals >= 0)).toBe(true);
  });

  test('tells its outcomes in a terminal and in a report', () => {
    const style = { colour: false, width: 100 };
    expect(results.outcomes.length).toBeGreaterThan(0);
    for (const text of [runText(results, style), pathText(path, style)]) expect(text).toContain(compiled.model.title);
    const page = buildReport({
      results,
      path,
      model: compiled.model,
      landscape: compiled.landscape,
      coefficients: compiled.coefficients,
      specText: modelText(name),
      commandLine: `skein report models/${name}.yaml -o ${name}.html`,
      pageScript: '',
    });
    expect(page).toMatch(/^<!doctype html>/i);
    expect(page).toContain('</html>');
    for (const { definition } of results.outcomes) expect(page).toContain(definition);
    expect(page).not.toMatch(/\b(?:NaN|undefined|Infinity)\b/);
  });
});

/** JSON has no NaN and no infinities: they would stand as null. */
function everyNumber(json: string): boolean {
  const allowed = /"(?:intervalFromUnknown|meanYears|withChance|reason|patch|lies|beyondError|0\.\d+)":null/g;
  return !json.replace(allowed, '').includes('null');
}
