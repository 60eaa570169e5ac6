// The colours of every figure: ink on paper, one hue for numbers (lagoon blue, darker is more), umber for movement.
// Nothing is told by hue alone; each pair below keeps its order of lightness in grey.
import { interpolateRgbBasis } from 'd3';

export const ink = '#1b2730';
export const softInk = '#4a5963';
export const rule = '#aab4b5';
export const hairline = '#d5dad8';
export const paper = '#fbfbf7';
export const deep = '#12495f';
export const middle = '#8fb4bf';
export const tint = '#d5e4e6';
export const umber = '#8f4f1f';

/** Light to dark for 0 to 1. */
export const ramp: (share: number) => string = interpolateRgbBasis([
  '#f3f7f5',
  '#c3d8db',
  '#7fabb8',
  '#38758c',
  '#0d3a4e',
]);

/** The same lightness for losses, whose numbers carry a minus: no sign is told by hue alone. */
export const lossRamp: (share: number) => string = interpolateRgbBasis([
  '#f9f6f1',
  '#e6d3bf',
  '#c79b71',
  '#94602f',
  '#5b2f0e',
]);

/** Ink that can be read on the ramps. */
export function inkOn(share: number): string {
  return share > 0.55 ? '#ffffff' : ink;
}

export const sans = "'Source Sans 3', 'Source Sans Pro', 'Segoe UI', Candara, 'Helvetica Neue', Arial, sans-serif";
