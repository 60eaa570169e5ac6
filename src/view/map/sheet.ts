// A map under way: where and how large everything stands, which no year changes, and what is shown.
import type { MapState, ReportView } from '../contract.ts';
import { largest } from '../series.ts';
import { sizeMarks, type Marks } from './marks.ts';
import { innerFrame, mapHeight, placePatches, type Placing } from './place.ts';

export interface Flows {
  /** Animals a year on the busiest link in its busiest year. */
  readonly most: number;
  /** Pixels at the origin for `most`. */
  readonly widest: number;
}

export interface Layout {
  readonly view: ReportView;
  readonly width: number;
  /** Without the key beneath. */
  readonly height: number;
  readonly placing: Placing;
  readonly marks: Marks;
  readonly flows: Flows;
}

export interface Sheet extends Layout {
  readonly state: MapState;
}

export function layOut(view: ReportView, width: number): Layout {
  const height = mapHeight(view.patches, width);
  const placing = placePatches(view.patches, innerFrame(view.patches, { width, height }));
  const marks = sizeMarks(view.patches, placing, width);
  const most = Math.max(0, ...view.links.map((link) => largest(link.animals)));
  return { view, width, height, placing, marks, flows: { most, widest: width < 500 ? 9 : 14 } };
}
