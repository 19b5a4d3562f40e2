/** All numbers from low to high; NaN in both when an operation is undefined on the whole interval. */
export type Interval = readonly [low: number, high: number];

export const emptyInterval: Interval = [Number.NaN, Number.NaN];
export const wholeLine: Interval = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];

/** Outward rounding: widens by a few units in the last place, so that no value is lost. */
export const roundOutward = (low: number, high: number): Interval => [
  Number.isFinite(low) ? low - Math.abs(low) * 4 * Number.EPSILON - Number.MIN_VALUE : low,
  Number.isFinite(high) ? high + Math.abs(high) * 4 * Number.EPSILON + Number.MIN_VALUE : high,
];

/** Products of infinite ends with zero are zero: the factor zero is exact. */
const product = (a: number, b: number): number => (a === 0 || b === 0 ? 0 : a * b);

export function times([a, b]: Interval, [c, d]: Interval): Interval {
  const all = [product(a, c), product(a, d), product(b, c), product(b, d)];
  return roundOutward(Math.min(...all), Math.max(...all));
}

export function dividedBy(above: Interval, [c, d]: Interval): Interval {
  if ((c < 0 && d > 0) || (c === 0 && d === 0)) return wholeLine;
  const ends: Interval = [
    d === 0 ? Number.NEGATIVE_INFINITY : 1 / d,
    c === 0 ? Number.POSITIVE_INFINITY : 1 / c,
  ];
  return times(above, ends);
}

/** Infinity minus infinity may be anything; an empty interval stays empty. */
const settled = (low: number, high: number, none: boolean): Interval => {
  if (none) return emptyInterval;
  return roundOutward(
    Number.isNaN(low) ? Number.NEGATIVE_INFINITY : low,
    Number.isNaN(high) ? Number.POSITIVE_INFINITY : high,
  );
};

export const plus = ([a, b]: Interval, [c, d]: Interval): Interval =>
  settled(a + c, b + d, Number.isNaN(a) || Number.isNaN(c));
export const minus = ([a, b]: Interval, [c, d]: Interval): Interval =>
  settled(a - d, b - c, Number.isNaN(a) || Number.isNaN(c));
export const hull = ([a, b]: Interval, [c, d]: Interval): Interval => {
  if (Number.isNaN(a)) return [c, d];
  return Number.isNaN(c) ? [a, b] : [Math.min(a, c), Math.max(b, d)];
};
export const contains = ([low, high]: Interval, value: number): boolean => low <= value && value <= high;

/** Image under a nondecreasing function. */
export const increasing = (of: (x: number) => number, [a, b]: Interval): Interval =>
  roundOutward(of(a), of(b));
