// Published and analytic matrices that several tests use; the numbers are copied in, the origin is beside each.

/** Loggerhead turtle, 7 stages (Crouse, Crowder & Caswell 1987; entries as quoted in a university course worksheet). */
export const loggerhead = [
  [0, 0, 0, 0, 127, 4, 80],
  [0.6747, 0.737, 0, 0, 0, 0, 0],
  [0, 0.0486, 0.661, 0, 0, 0, 0],
  [0, 0, 0.0147, 0.6907, 0, 0, 0],
  [0, 0, 0, 0.0518, 0, 0, 0],
  [0, 0, 0, 0, 0.8091, 0, 0],
  [0, 0, 0, 0, 0, 0.8091, 0.8089],
];

/** Killer whale (Brault & Caswell 1993, eq. 2, as quoted in a university worksheet). */
export const killerWhale = [
  [0, 0.0043, 0.1132, 0],
  [0.9775, 0.9111, 0, 0],
  [0, 0.0736, 0.9534, 0],
  [0, 0, 0.0452, 0.9804],
];

/** Teasel (Werner & Caswell 1977; from memory of Caswell 2001). */
export const teasel = [
  [0, 0, 0, 0, 0, 322.38],
  [0.966, 0, 0, 0, 0, 0],
  [0.013, 0.01, 0.125, 0, 0, 3.448],
  [0.007, 0, 0.125, 0.238, 0, 30.17],
  [0.008, 0, 0.038, 0.245, 0.167, 0.862],
  [0, 0, 0, 0.023, 0.75, 0],
];

/** Two stages with closed forms (derived). */
export const twoStage = [
  [0, 1.2],
  [0.3, 0.8],
];

/** Three ages with a defective second eigenvalue (from memory of Williamson 1959). */
export const williamson = [
  [0, 9, 12],
  [1 / 3, 0, 0],
  [0, 1 / 2, 0],
];

/** Three ages that breed once, period 3 (from memory of Bernardelli 1941). */
export const bernardelli = [
  [0, 0, 6],
  [1 / 2, 0, 0],
  [0, 1 / 3, 0],
];

/** The 4×4 matrix whose tenth power is the first without zeros (from memory of Wielandt 1950). */
export const wielandt = [
  [0, 1, 0, 0],
  [0, 0, 1, 0],
  [0, 0, 0, 1],
  [1, 1, 0, 0],
];

/** Nobody breeds: n(t) is 0 from step n on (derived). */
export const ageingOnly = [
  [0, 0, 0, 0],
  [1, 0, 0, 0],
  [0, 1, 0, 0],
  [0, 0, 1, 0],
];
