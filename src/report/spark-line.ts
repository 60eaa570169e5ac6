// A course of numbers as one line of text.

const heights = ['▁', '▂', '▃', '▄', '▅', '▆', '▇', '█'] as const;

/** From 0 to the largest; long courses are read at evenly spaced places. Nothing at all is a dot on the ground. */
export function sparkLine(values: readonly number[], room: number): string {
  const most = Math.max(...values, 0);
  const count = Math.max(1, Math.min(values.length, room));
  return Array.from({ length: count }, (_, i) => {
    const at = count === 1 ? values.length - 1 : Math.round((i * (values.length - 1)) / (count - 1));
    const value = values[at] ?? 0;
    if (value === 0 || most === 0) return '·';
    return heights[Math.min(7, Math.floor((value / most) * 8))] ?? '█';
  }).join('');
}
