// Two models, or two scenarios, beside each other: what makes them grow differently, by entry and by named number.
import { describe, expect, test } from 'vitest';
import { against } from '../../src/analysis/against.ts';
import { analyseModel } from '../../src/analysis/analyse-model.ts';
import { analysisText } from '../../src/report/analysis/analysis-text.ts';
import { compileText } from '../pipeline/compile-text.ts';

const fen = (s: number, f: number, others = '') => `
skein: 1
study: { title: Fen with ${s}, invented: true }
first-year: 2027
years: 10
patches: [{ name: Fen }]
counts: females
classes: [young, adult]
oldest: open-ended
parameters: { s: ${s}, s0: 0.3, f: ${f} }
demography: { fates: [[0, 0], [s0, s]], births: [[0, s * f], [0, 0]] }
year: [count, demography]
start: { table: { Fen: { young: 10, adult: 10 } } }
${others}
`;
const at = 'zero' as const;

describe('two models', () => {
  const [good, poor] = [compileText(fen(0.85, 1.6)), compileText(fen(0.75, 1.4))];
  const { ltre } = analyseModel(good, { at, against: { name: 'the poor fen', compiled: poor } }).value!;

  test('the parts of entries and of named numbers both sum to the difference, to third order', () => {
    const growth = [good, poor].map((compiled) => analyseModel(compiled, { at }).value!.growthRate);
    expect(ltre!.difference).toBeCloseTo(growth[0]! - growth[1]!, 12);
    expect(ltre!.difference).toBeGreaterThan(0.1);
    expect(Math.abs(ltre!.unexplained)).toBeLessThan(2e-3 * ltre!.difference);
    expect(Math.abs(ltre!.unexplainedByParameters!)).toBeLessThan(2e-3 * ltre!.difference);
  });

  // The characteristic equation λ² − sλ − s f s0 … has, half-way, the slopes of the model at s = 0.8 and f = 1.5.
  test('each number by its slope half-way', () => {
    const middle = analyseModel(compileText(fen(0.8, 1.5)), { at }).value!;
    for (const { name, value, reference, contribution } of ltre!.parameters!) {
      const { sensitivity } = middle.parameters!.find((one) => one.name === name)!;
      expect(contribution).toBeCloseTo((value - reference) * sensitivity, 12);
    }
    expect(ltre!.parameters!.map(({ name }) => name)).toEqual(['s', 'f']);
  });

  test('the other way round all signs turn', () => {
    const { ltre: back } = analyseModel(poor, { at, against: { name: 'the good fen', compiled: good } }).value!;
    expect(back!.difference).toBeCloseTo(-ltre!.difference, 12);
    back!.contributions.forEach(({ contribution }, k) =>
      expect(contribution).toBeCloseTo(-ltre!.contributions[k]!.contribution, 12),
    );
  });

  test('in words, with the other by its name', () => {
    const found = analyseModel(good, { at, against: { name: 'the poor fen', compiled: poor } }).value!;
    const text = analysisText(found, { colour: false, width: 100 });
    expect(text).toMatch(/What makes the difference, by named number\nnumber +here +the poor fen/);
    expect(text).toMatch(/The growth rate differs by 0\.\d+ from that of the poor fen/);
  });
});

test('a scenario against none: what an action changes', () => {
  const plans = `
actions: { feeding: { kind: change, parameters: { f: { set: 1.8 } } } }
scenarios: { fed: [feeding] }
`;
  const [fed, plain] = ['fed', 'as now'].map((scenario) => compileText(fen(0.8, 1.5, plans), { scenario }));
  const { ltre } = analyseModel(fed!, { at, against: { name: 'as now', compiled: plain! } }).value!;
  expect(ltre!.parameters).toEqual([
    { name: 'f', value: 1.8, reference: 1.5, contribution: expect.closeTo(ltre!.difference, 3) },
  ]);
});

test('other patches or classes, or no named number, are told', () => {
  const other = compileText(
    fen(0.8, 1.5).replace('[{ name: Fen }]', '[{ name: Moor }]').replace('{ Fen: {', '{ Moor: {'),
  );
  const found = against(compileText(fen(0.8, 1.5)), { name: 'Moor', compiled: other }, at);
  expect(found).toEqual({ value: null, reason: expect.stringMatching(/Moor has other patches/) });
  const written = compileText(fen(0.8, 1.5).replace('s * f', 's * 1.6'));
  const { value } = against(written, { name: 'f', compiled: compileText(fen(0.8, 1.5)) }, at);
  expect(value!.parameters).toMatchObject({ value: null, reason: expect.stringMatching(/No named number differs/) });
});
