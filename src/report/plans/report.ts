// The report of a comparison: the question, what the results support, the plans against each other, and what must be known
// before anyone acts.
import { mark, type Markup } from '../../view/markup.ts';
import type { PlanView, ReportView } from '../../view/contract.ts';
import { writeDocument } from '../document.ts';
import { annexSection, limitsSection } from '../section/annex.ts';
import { criterionId } from '../section/criterion.ts';
import { abundanceSection } from '../section/courses.ts';
import { hidingWords } from '../hiding/hiding-words.ts';
import { headSection } from '../section/head.ts';
import { mapSection } from '../section/map.ts';
import { styleSheet } from '../style.ts';
import { summariseForView } from '../view.ts';
import { worthNote } from '../worth.ts';
import { plansAnswer } from './answer.ts';
import { criteriaSection, saysCriteria } from './criteria.ts';
import { planCourses } from './courses.ts';
import { differencesSection, moreDifferences } from './differences.ts';
import type { PlansReportInput } from './input.ts';
import { pairOfMaps } from './maps.ts';
import { moneySection } from './money.ts';
import { patchesSection } from './patches.ts';
import { robustSection } from './robust.ts';
import { signsSection } from './signs.ts';
import { plansSection, readingSection } from './table.ts';

/** Patches of all plans together whose numbers travel in the page; with more it would grow heavy. */
const mostPatchesOfPlans = 600;

export function buildPlansReport(input: PlansReportInput): string {
  const { model, results, comparison } = input;
  const view = withPlans(input);
  const chosen = shownPlan(input);
  const name = comparison.scenarios[chosen]?.name ?? '';
  const base = comparison.scenarios[0]?.name ?? '';
  const summary = (program: Markup) => [
    plansAnswer(comparison),
    plansSection(comparison, view.animals),
    mapSection(view, {
      worth: worthNote(input),
      hidden: hidingWords(input),
      plan: base,
      program,
      more: pairOfMaps(view, chosen),
    }),
    differencesSection(comparison),
  ];
  const rest = [
    readingSection(comparison),
    moreDifferences(comparison),
    planCourses(view),
    moneySection(comparison),
    patchesSection(comparison, name, view.animals),
    robustSection(comparison),
    signsSection(comparison, view.animals),
    abundanceSection(view, results, base),
    criteriaSection(input.plans),
    limitsSection({ ...input, results: { ...results, cautions: comparison.cautions } }),
    annexSection(input),
  ];
  const foot = `skein ${results.tool.version} · ${comparison.hash.slice(0, 16)} · ${model.date ?? 'no date given'}`;
  return writeDocument({
    title: `${model.title}: decision report`,
    style: styleSheet(foot),
    program: { script: input.pageScript, data: view },
    body: (program) =>
      mark`${headSection(model, results)}${contents(view, { money: comparison.money !== null, criteria: saysCriteria(input.plans) })}<div class="summary">${summary(program)}</div><div class="pages plans-rest">${rest}</div><footer>${foot}</footer>`,
  });
}

function withPlans(input: PlansReportInput): ReportView {
  const view = summariseForView(input);
  const plans = input.plans.map(({ name, input: own }): PlanView => ({
    name,
    view: summariseForView({ ...own, specText: '', commandLine: '', pageScript: '' }),
  }));
  const patches = plans.reduce((sum, plan) => sum + plan.view.patches.length, 0);
  return patches > mostPatchesOfPlans ? view : { ...view, plans };
}

/** The plan that the statement leaves; where it leaves none, the one that does best. */
function shownPlan({ comparison: { scenarios, statement, objectives } }: PlansReportInput): number {
  const left = scenarios.findIndex(({ name }) => name === statement.plans[0]);
  if (left > 0) return left;
  const [objective] = objectives;
  const worth = scenarios.map(({ outcomes, animalsAtEnd }) => {
    const chance = outcomes.find(({ name }) => name === objective?.name)?.probability;
    return chance === undefined ? animalsAtEnd.mean : objective?.better === 'more' ? chance : -chance;
  });
  return Math.max(1, worth.slice(1).indexOf(Math.max(...worth.slice(1))) + 1);
}

interface Parts {
  readonly money: boolean;
  readonly criteria: boolean;
}

function contents({ plans, outcomes }: ReportView, { money, criteria }: Parts): Markup {
  const places = [
    ['answer', 'Answer'],
    ['plans', 'Plans'],
    ['map', 'Map'],
    ['differences', 'Differences'],
    ...(plans === undefined || outcomes.length === 0 ? [] : [['chances', 'Chances by year']]),
    ...(money && outcomes.length > 0 ? [['money', 'Cost and risk']] : []),
    ['patches', 'Patches'],
    ['robust', 'Other models'],
    ['signs', 'Who signs'],
    ['abundance', 'Abundance'],
    ...(criteria ? [[criterionId, 'Criterion E']] : []),
    ['limits', 'Limits'],
    ['annex', 'Annex'],
  ];
  const links = places.map(([id = '', name = '']) => mark`<li><a href="#${id}">${name}</a></li>`);
  return mark`<nav aria-label="Contents"><ul>${links}</ul></nav>`;
}
