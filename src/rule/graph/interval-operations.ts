import {
  contains,
  everywhere,
  hull,
  type Interval,
  minus,
  nowhere,
  outward,
  over,
  plus,
  rising,
  times,
} from "./interval.js";
import type { Operator } from "./node.js";
import { roundTo } from "./operations.js";

type IntervalOperation = (a: Interval, b: Interval, c: Interval) => Interval;

const no: Interval = [0, 0];
const yes: Interval = [1, 1];
const either: Interval = [0, 1];

const decided = (always: boolean, never: boolean): Interval => (always ? yes : never ? no : either);

/** Image under a rising function that has values from zero on only. */
const fromZero =
  (of: (x: number) => number): IntervalOperation =>
  ([low, high]) =>
    high < 0 ? nowhere : rising(of, [Math.max(low, 0), high]);

const abs: IntervalOperation = ([low, high]) => {
  if (low >= 0) return [low, high];
  return high <= 0 ? [-high, -low] : [0, Math.max(-low, high)];
};

function wholePower(base: Interval, exponent: number): Interval {
  if (exponent < 0) return over(yes, wholePower(base, -exponent));
  const even = exponent % 2 === 0;
  return rising((x) => x ** exponent, even ? abs(base, no, no) : base);
}

const power: IntervalOperation = (base, exponent) => {
  const [low, high] = exponent;
  if (low === high && Number.isInteger(low) && Math.abs(low) < 1e6) return wholePower(base, low);
  if (base[1] < 0) return nowhere;
  const positive: Interval = [Math.max(base[0], 0), base[1]];
  const corners = [
    positive[0] ** low,
    positive[0] ** high,
    positive[1] ** low,
    positive[1] ** high,
    // 1 and 0 are where the power turns from falling to rising.
    ...(positive[0] < 1 && positive[1] > 1 ? [1] : []),
    ...(low < 0 && high > 0 ? [1] : []),
  ].filter((value) => !Number.isNaN(value));
  return outward(Math.min(...corners), Math.max(...corners));
};

/** Whether place + a whole number of turns lies in the interval, or so close that rounding cannot tell. */
function turnsTo(place: number, [low, high]: Interval): boolean {
  const turn = 2 * Math.PI;
  const slack = 1e-9 * Math.max(1, Math.abs(low), Math.abs(high));
  return Math.ceil((low - slack - place) / turn) * turn + place <= high + slack;
}

/** Sine or cosine, which is 1 at the peak and -1 half a turn from it. */
const wave =
  (of: (x: number) => number, peak: number): IntervalOperation =>
  ([low, high]) => {
    if (!(high - low < 2 * Math.PI)) return [-1, 1];
    const ends = [of(low), of(high)];
    const least = turnsTo(peak + Math.PI, [low, high]) ? -1 : Math.min(...ends);
    return outward(least, turnsTo(peak, [low, high]) ? 1 : Math.max(...ends));
  };

const tan: IntervalOperation = ([low, high]) => {
  const crosses = Math.floor(low / Math.PI + 0.5) !== Math.floor(high / Math.PI + 0.5);
  return crosses || !(high - low < Math.PI) ? everywhere : rising(Math.tan, [low, high]);
};

const mod: IntervalOperation = (x, divisor) =>
  contains(divisor, 0) ? everywhere : minus(x, times(divisor, rising(Math.floor, over(x, divisor))));

/** Enclosures of every operation: the result holds the value at each point of the arguments. */
export const intervalOperations: Readonly<Record<Operator, IntervalOperation>> = {
  add: plus,
  subtract: minus,
  multiply: times,
  divide: over,
  power,
  negate: ([low, high]) => [-high, -low],
  less: (a, b) => decided(a[1] < b[0], a[0] >= b[1]),
  lessOrEqual: (a, b) => decided(a[1] <= b[0], a[0] > b[1]),
  equal: (a, b) => decided(a[0] === a[1] && a[0] === b[0] && b[0] === b[1], a[1] < b[0] || b[1] < a[0]),
  and: (a, b) => [a[0] * b[0], a[1] * b[1]],
  or: (a, b) => [Math.max(a[0], b[0]), Math.max(a[1], b[1])],
  not: ([low, high]) => [1 - high, 1 - low],
  choose: (condition, a, b) => (condition[0] === 1 ? a : condition[1] === 0 ? b : hull(a, b)),
  exp: (a) => rising(Math.exp, a),
  log: fromZero(Math.log),
  log10: fromZero(Math.log10),
  sqrt: fromZero(Math.sqrt),
  abs,
  sign: (a) => rising(Math.sign, a),
  min: (a, b) => [Math.min(a[0], b[0]), Math.min(a[1], b[1])],
  max: (a, b) => [Math.max(a[0], b[0]), Math.max(a[1], b[1])],
  floor: (a) => rising(Math.floor, a),
  ceil: (a) => rising(Math.ceil, a),
  round: (a, digits) => rising((x) => roundTo(x, digits[0]), a),
  mod,
  sin: wave(Math.sin, Math.PI / 2),
  cos: wave(Math.cos, 0),
  tan,
  asin: ([low, high]) =>
    low > 1 || high < -1 ? nowhere : rising(Math.asin, [Math.max(low, -1), Math.min(high, 1)]),
};
