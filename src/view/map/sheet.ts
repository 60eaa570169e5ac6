// A map under way: what is shown, and where and how large everything stands.
import type { MapState, ReportView } from '../contract.ts';
import { largest } from '../series.ts';
import { sizeDiscs, type Discs } from './discs.ts';
import { innerFrame, mapHeight, placePatches, type Placing } from './place.ts';

export interface Flows {
  /** Animals a year on the busiest link in its busiest year. */
  readonly most: number;
  /** Pixels at the origin for `most`. */
  readonly widest: number;
}

export interface Sheet {
  readonly view: ReportView;
  readonly state: MapState;
  readonly width: number;
  /** Without the key beneath. */
  readonly height: number;
  readonly placing: Placing;
  readonly discs: Discs;
  readonly flows: Flows;
}

export function layOut(view: ReportView, state: MapState, width: number): Sheet {
  const height = mapHeight(view.patches, width);
  const placing = placePatches(view.patches, innerFrame({ width, height }));
  const discs = sizeDiscs(view.patches, placing.points, width);
  const most = Math.max(0, ...view.links.map((link) => largest(link.animals)));
  return { view, state, width, height, placing, discs, flows: { most, widest: width < 500 ? 9 : 14 } };
}
