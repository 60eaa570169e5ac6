// What the figures and tables of a report are drawn from. Plain data: it travels inside the page as JSON, and nothing in
// view/ or page/ knows more of a model than this. Index p is a patch, index i is a count (0 is the start).

/** One number a count. */
export type Series = readonly number[];

/** Abundance over many futures, by count. */
export interface Fan {
  readonly mean: Series;
  readonly p05: Series;
  readonly p25: Series;
  readonly median: Series;
  readonly p75: Series;
  readonly p95: Series;
}

/** A closed line on the plane, in kilometres. */
export type RingView = readonly (readonly [number, number])[];

/** Polygons, each an outer ring and those of its holes. */
export type OutlineView = readonly (readonly RingView[])[];

/** What a patch is to the whole. */
export interface WorthView {
  readonly role: 'source' | 'sink' | 'undecided';
  /** Animals a year later, in all patches, for each animal there. */
  readonly contribution: number;
  /** Yearly growth where all that leave are lost and nobody comes. */
  readonly growthAlone: number;
}

export interface PatchView {
  readonly name: string;
  /** Kilometres on the plane; null where the figures place the patches by themselves. */
  readonly at: readonly [number, number] | null;
  /** Null where the patch is a point. */
  readonly outline: OutlineView | null;
  readonly capacity: number | null;
  readonly areaKm2: number | null;
  readonly fan: Fan;
  /** Share of the futures in which nobody is there; null where it is not known. */
  readonly empty: Series | null;
  readonly worth: WorthView | null;
}

/** A count of the past; the bar is the 95 % interval of the count itself, null where its error is not known. */
export interface CountedView {
  readonly year: number;
  readonly animals: number;
  readonly bar: readonly [number, number] | null;
  /** Against the band of 90 of 100 futures; null where the year is none that the model runs through. */
  readonly lies: 'below' | 'within' | 'above' | null;
}

/** What was counted, over what the futures have of the same classes and patches. */
export interface CountedFanView {
  readonly name: string;
  readonly fan: Fan;
  readonly counts: readonly CountedView[];
}

export interface ObservedView {
  /** Such as 'adult'. */
  readonly classes: string;
  readonly together: CountedFanView;
  readonly patches: readonly CountedFanView[];
}

export interface LinkView {
  /** Index into `patches`. */
  readonly from: number;
  readonly to: number;
  /** Animals that arrive in the year that ends with count i; 0 at the start. */
  readonly animals: Series;
}

export interface OutcomeView {
  readonly name: string;
  readonly definition: string;
  /** The first count that is looked at; the series hold nothing before it. */
  readonly first: number;
  readonly ever: Series;
  readonly lower: Series;
  readonly upper: Series;
  /** Chance that it is so at count i, whatever was before. */
  readonly now: Series;
  /** To be put behind 'have', and behind 'are'. */
  readonly words: { readonly happened: string; readonly now: string };
}

export interface ReportView {
  readonly format: 'skein-view/1';
  readonly title: string;
  readonly hash: string;
  /** What one individual is called: 'females' or 'animals'. */
  readonly animals: string;
  readonly futures: number;
  readonly years: Series;
  readonly whole: Fan;
  readonly inUse: Fan;
  readonly patches: readonly PatchView[];
  readonly links: readonly LinkView[];
  /** Links that exist but are too weak to be kept among so many. */
  readonly linksLeftOut: number;
  /** Absent where patches stand where they are. */
  readonly places?: 'shifted' | 'schematic';
  readonly outcomes: readonly OutcomeView[];
  /** Absent where the model gives no counts of the past. */
  readonly observed?: ObservedView;
  /** Where the worth of patches was taken, to follow 'taken'; null where it is not told. */
  readonly worthAt: string | null;
  /** Every plan of a comparison, this one first; absent where there is none, or where so much would make the page heavy. */
  readonly plans?: readonly PlanView[];
  /** The view that a map of differences takes away from this one. */
  readonly minus?: PlanView;
}

export interface PlanView {
  readonly name: string;
  readonly view: ReportView;
}

/** What the map can show; outlines tell source or sink in each. */
export const mapShows = ['abundance', 'empty', 'contribution', 'role'] as const;
/** Differences are shown where there is a view to take away. */
export type MapShow = (typeof mapShows)[number] | 'difference';

/** What the map shows at a moment. */
export interface MapState {
  /** Index into `years`. */
  readonly count: number;
  readonly show: MapShow;
  /** The patch that the keyboard is at, where the map is live; null for a still picture. */
  readonly focus: number | null;
}

/** Pixels. */
export interface Size {
  readonly width: number;
  readonly height: number;
}
