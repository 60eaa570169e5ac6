// Money against risk: every plan a dot with the interval of its chance; those that no plan beats in both stand on a stair.
import { scaleLinear } from 'd3';
import type { Size } from '../contract.ts';
import { figure, textWidth, fitText } from '../figure.ts';
import { mark, type Markup } from '../markup.ts';
import { plain } from '../number.ts';
import { deep, hairline, ink, middle, paper, softInk } from '../palette.ts';

export interface PlanDot {
  readonly name: string;
  readonly cost: number;
  /** Shares from 0 to 1. */
  readonly risk: number;
  readonly lower: number;
  readonly upper: number;
  readonly notBeaten: boolean;
}

export interface CostRiskChart {
  readonly outcome: string;
  readonly currency: string;
  readonly plans: readonly PlanDot[];
}

const margins = { top: 34, right: 40, bottom: 46, left: 44 } as const;

export function drawCostRisk({ outcome, currency, plans }: CostRiskChart, size: Size): Markup {
  const costs = plans.map(({ cost }) => cost);
  const [least, most] = [Math.min(0, ...costs), Math.max(...costs, 1)];
  const x = scaleLinear([least, most], [margins.left + 8, size.width - margins.right]).nice(5);
  const highest = Math.max(0.02, ...plans.map(({ upper }) => upper)) * 100;
  const y = scaleLinear([0, highest], [size.height - margins.bottom, margins.top]).nice(4);
  const foot = size.height - margins.bottom;
  const written = y.tickFormat(4);
  const across = y.ticks(4).map(
    (
      value,
    ) => mark`<line x1="${margins.left}" x2="${size.width - margins.right}" y1="${y(value)}" y2="${y(value)}" stroke="${value === 0 ? ink : hairline}"/>
<text x="${margins.left - 7}" y="${y(value) + 4}" text-anchor="end" fill="${softInk}">${written(value)}</text>`,
  );
  const along = x.ticks(Math.max(2, Math.floor(size.width / 140))).map(
    (value) => mark`<line x1="${x(value)}" x2="${x(value)}" y1="${foot}" y2="${foot + 4}" stroke="${ink}"/>
<text x="${x(value)}" y="${foot + 18}" text-anchor="middle" fill="${softInk}">${plain(value)}</text>`,
  );
  const at = (plan: PlanDot): readonly [number, number] => [x(plan.cost), y(plan.risk * 100)];
  const titles = mark`<text x="0" y="18" fill="${softInk}">of 100 futures, “${fitText(outcome, 13, size.width * 0.5)}”</text>
<text x="${size.width - margins.right}" y="${size.height - 8}" text-anchor="end" fill="${softInk}">cost now, ${currency}</text>`;
  const dots = plans.map((plan) => dot(plan, { at: at(plan), ends: [y(plan.lower * 100), y(plan.upper * 100)] }));
  const content = mark`<g>${across}${along}</g>${titles}${stair(plans, at)}${dots}${names(plans, at, size)}`;
  return figure(size, wordsOf({ outcome, currency, plans }), content);
}

/** Down along the plans that nothing beats. */
function stair(plans: readonly PlanDot[], at: (plan: PlanDot) => readonly [number, number]): Markup | null {
  const free = plans.filter(({ notBeaten }) => notBeaten).toSorted((a, b) => a.cost - b.cost || b.risk - a.risk);
  const [first, ...rest] = free;
  if (first === undefined || rest.length === 0) return null;
  const [startX, startY] = at(first);
  const path = rest.map((plan) => `H${at(plan)[0].toFixed(1)}V${at(plan)[1].toFixed(1)}`).join('');
  return mark`<path d="M${startX.toFixed(1)} ${startY.toFixed(1)}${path}" fill="none" stroke="${middle}" stroke-width="2"/>`;
}

interface Placed {
  readonly at: readonly [number, number];
  readonly ends: readonly [number, number];
}

function dot({ notBeaten }: PlanDot, { at: [x, y], ends: [low, high] }: Placed): Markup {
  return mark`<line x1="${x}" x2="${x}" y1="${low}" y2="${high}" stroke="${deep}" stroke-width="1.5"/>
<circle cx="${x}" cy="${y}" r="5.5" fill="${notBeaten ? deep : paper}" stroke="${deep}" stroke-width="1.75"/>`;
}

/** Beside the dots, moved up or down until none lies over another. */
function names(plans: readonly PlanDot[], at: (plan: PlanDot) => readonly [number, number], { width }: Size): Markup {
  const taken: { left: number; right: number; y: number }[] = [];
  const order = plans.toSorted((a, b) => at(a)[1] - at(b)[1]);
  const halo = mark`stroke="${paper}" stroke-width="3.5" stroke-linejoin="round" paint-order="stroke"`;
  const texts = order.map((plan) => {
    const [x, y] = at(plan);
    const name = fitText(plan.name, 13, width * 0.4);
    const wide = textWidth(name, 13);
    const left = x + 10 + wide < width - 4;
    const box = { left: left ? x + 10 : x - 10 - wide, right: left ? x + 10 + wide : x - 10, y: y + 4.5 };
    while (taken.some((one) => one.left < box.right && box.left < one.right && Math.abs(one.y - box.y) < 15))
      box.y += 4;
    taken.push(box);
    return mark`<text x="${box.left}" y="${box.y}">${name}</text>`;
  });
  return mark`<g fill="${ink}" ${halo}>${texts}</g>`;
}

function wordsOf({ outcome, currency, plans }: CostRiskChart) {
  const each = plans.map(
    ({ name, cost, risk, notBeaten }) =>
      `${name}: ${plain(cost)} ${currency}, ${plain(risk * 100)} of 100${notBeaten ? ', no other plan both cheaper and safer' : ''}`,
  );
  return { title: `Cost and chance of ${outcome} of each plan`, description: `${each.join('; ')}.` };
}
