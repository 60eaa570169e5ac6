// Points, rings and polygons on a plane, x to the east and y to the north.

export type Point = readonly [number, number];

/** A closed line; its first point is not repeated at its end. */
export type Ring = readonly Point[];

/** The outer ring, then those of its holes. */
export type Polygon = readonly Ring[];

/** The polygons of one place. */
export type Outline = readonly Polygon[];
