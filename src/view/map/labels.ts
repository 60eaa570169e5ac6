// Names beside their patches: for each, the free place that covers least; in a crowd only those that find one.
import { fitText, textWidth } from '../figure.ts';
import { pick } from '../series.ts';

export interface Label {
  readonly patch: number;
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly anchor: 'start' | 'middle' | 'end';
}

interface Box {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

interface Candidate extends Label {
  readonly box: Box;
}

const fontSize = 13;

export function placeLabels(
  names: readonly string[],
  points: readonly (readonly [number, number])[],
  radius: readonly number[],
  frame: Box,
): readonly Label[] {
  const discs = points.map(([x, y], p) => around(x, y, pick(radius, p)));
  const order = names.map((_, p) => p).sort((a, b) => pick(radius, b) - pick(radius, a));
  const taken: Box[] = [...discs];
  const crowd = names.length > 25;
  const labels: Label[] = [];
  for (const p of order) {
    const scored = candidates(p, pick(names, p), pick(points, p), pick(radius, p))
      .map((label, rank) => ({ label, cost: cost(label.box, taken, frame) + rank * 0.5 }))
      .sort((a, b) => a.cost - b.cost);
    const best = pick(scored, 0);
    if (crowd && best.cost > 8) continue;
    taken.push(best.label.box);
    labels.push(best.label);
  }
  return labels;
}

function candidates(patch: number, name: string, at: readonly [number, number], radius: number): Candidate[] {
  const text = fitText(name, fontSize, 140);
  const width = textWidth(text, fontSize);
  const [x, y] = at;
  const slant = radius * 0.72 + 3;
  const spots: [number, number, Label['anchor']][] = [
    [x, y + radius + 14, 'middle'],
    [x, y - radius - 6, 'middle'],
    [x + radius + 6, y + 4.5, 'start'],
    [x - radius - 6, y + 4.5, 'end'],
    [x + slant, y + slant + 9, 'start'],
    [x - slant, y + slant + 9, 'end'],
    [x + slant, y - slant, 'start'],
    [x - slant, y - slant, 'end'],
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

function cost(box: Box, taken: readonly Box[], frame: Box): number {
  let covered = 0;
  for (const other of taken) {
    const wide = Math.min(box.right, other.right) - Math.max(box.left, other.left);
    const high = Math.min(box.bottom, other.bottom) - Math.max(box.top, other.top);
    if (wide > 0 && high > 0) covered += wide * high;
  }
  const outside =
    Math.max(0, frame.left - box.left) +
    Math.max(0, box.right - frame.right) +
    Math.max(0, frame.top - box.top) +
    Math.max(0, box.bottom - frame.bottom);
  return covered + outside * 40;
}

function around(x: number, y: number, radius: number): Box {
  return { left: x - radius, right: x + radius, top: y - radius, bottom: y + radius };
}
