// The cost of a cell over size, as a picture.
import type { Scaling } from './scaling.ts';

const [width, height, margin] = [320, 220, 40];

/** Four small charts in one SVG; sizes on a logarithmic axis, costs from 0. */
export function plotScaling(all: readonly Scaling[]): string {
  const highest =
    Math.max(...all.flatMap(({ points }) => points.map(({ nanosecondsACell }) => nanosecondsACell))) * 1.1;
  const charts = all.map((scaling, k) => chart(scaling, highest, [(k % 2) * width, Math.floor(k / 2) * height]));
  const size = `width="${2 * width}" height="${2 * height}" viewBox="0 0 ${2 * width} ${2 * height}"`;
  return `<svg xmlns="http://www.w3.org/2000/svg" ${size} font-family="sans-serif" font-size="10"><title>Nanoseconds a cell over size</title>\n${charts.join('\n')}\n</svg>\n`;
}

function chart({ over, points }: Scaling, highest: number, [left, top]: readonly [number, number]): string {
  const first = Math.log(points[0]?.at ?? 1);
  const last = Math.log(points.at(-1)?.at ?? 10);
  const x = (at: number): number => margin + ((Math.log(at) - first) / (last - first)) * (width - 2 * margin);
  const y = (cost: number): number => height - margin - (cost / highest) * (height - 2 * margin);
  const line = points
    .map(({ at, nanosecondsACell }) => `${x(at).toFixed(1)},${y(nanosecondsACell).toFixed(1)}`)
    .join(' ');
  const marks = points.map(
    ({ at, nanosecondsACell: cost }) =>
      `<circle cx="${x(at).toFixed(1)}" cy="${y(cost).toFixed(1)}" r="2.5"/><text x="${x(at).toFixed(1)}" y="${height - margin + 12}" text-anchor="middle">${at}</text><text x="${x(at).toFixed(1)}" y="${(y(cost) - 6).toFixed(1)}" text-anchor="middle">${cost.toFixed(0)}</text>`,
  );
  return `<g transform="translate(${left} ${top})"><text x="${margin}" y="20">ns a cell over ${over}</text><line x1="${margin}" y1="${height - margin}" x2="${width - margin}" y2="${height - margin}" stroke="black"/><polyline points="${line}" fill="none" stroke="black"/>${marks.join('')}</g>`;
}
