/** Unit roundoff of IEEE double precision, 2^-53: the relative error of one correctly rounded operation. */
export const UNIT_ROUNDOFF = Number.EPSILON / 2;

/** Smallest normal double: below it relative accuracy is lost, so every bound carries at least this much. */
export const SMALLEST_NORMAL = 2 ** -1022;
