/** A point or a free vector of the plane, [x, y]. Units are those of the quantity it holds. */
export type Vec = readonly [number, number];
