// Names beside their patches: for each, the free place that covers least; in a crowd only those that find one.
import { fitText, textWidth } from '../figure.ts';
import { pick } from '../series.ts';
import { createCrowd, type Crowd } from './crowd.ts';
import type { Box, Shape } from './shape.ts';

export interface Label {
  readonly patch: number;
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly anchor: 'start' | 'middle' | 'end';
}

interface Candidate extends Label {
  readonly box: Box;
}

const fontSize = 13;

export function placeLabels(names: readonly string[], shapes: readonly Shape[], frame: Box): readonly Label[] {
  const order = names.map((_, p) => p).sort((a, b) => pick(shapes, b).radius - pick(shapes, a).radius);
  const taken = createCrowd();
  for (const { box } of shapes) taken.add(box);
  const crowd = names.length > 25;
  const labels: Label[] = [];
  for (const p of order) {
    const scored = candidates(p, pick(names, p), pick(shapes, p))
      .map((label, rank) => ({ label, cost: cost(label.box, taken, frame) + rank * 0.5 }))
      .sort((a, b) => a.cost - b.cost);
    const best = pick(scored, 0);
    if (crowd && best.cost > 8) continue;
    taken.add(best.label.box);
    labels.push(best.label);
  }
  return labels;
}

function candidates(patch: number, name: string, shape: Shape): Candidate[] {
  const text = fitText(name, fontSize, 170);
  const width = textWidth(text, fontSize);
  const { left: west, right: east, top, bottom } = shape.box;
  const [x, y] = [(west + east) / 2, (top + bottom) / 2];
  const [wide, high] = [((east - west) / 2) * 0.72 + 3, ((bottom - top) / 2) * 0.72 + 3];
  const spots: [number, number, Label['anchor']][] = [
    [x, bottom + 17, 'middle'],
    [x, top - 8, 'middle'],
    [east + 8, y + 4.5, 'start'],
    [west - 8, y + 4.5, 'end'],
    [x + wide, y + high + 11, 'start'],
    [x - wide, y + high + 11, 'end'],
    [x + wide, y - high - 2, 'start'],
    [x - wide, y - high - 2, 'end'],
  ];
  return spots.map(([left, base, anchor]) => {
    const from = anchor === 'start' ? left : anchor === 'end' ? left - width : left - width / 2;
    return {
      patch,
      text,
      x: left,
      y: base,
      anchor,
      box: { left: from, right: from + width, top: base - 11, bottom: base + 4 },
    };
  });
}

function cost(box: Box, taken: Crowd, frame: Box): number {
  const covered = taken.covered(box);
  const outside =
    Math.max(0, frame.left - box.left) +
    Math.max(0, box.right - frame.right) +
    Math.max(0, frame.top - box.top) +
    Math.max(0, box.bottom - frame.bottom);
  return covered + outside * 40;
}
