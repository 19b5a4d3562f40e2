import {
  contains,
  dividedBy,
  emptyInterval,
  hull,
  type Interval,
  increasing,
  minus,
  plus,
  roundOutward,
  times,
  wholeLine,
} from "./interval.js";
import type { Operator } from "./node.js";
import { roundTo } from "./operations.js";

type IntervalOperation = (a: Interval, b: Interval, c: Interval) => Interval;

const falseInterval: Interval = [0, 0];
const trueInterval: Interval = [1, 1];
const eitherTruth: Interval = [0, 1];

const truthInterval = (always: boolean, never: boolean): Interval =>
  always ? trueInterval : never ? falseInterval : eitherTruth;

/** Image under an increasing function that is defined from zero on. */
const onNonNegative =
  (of: (x: number) => number): IntervalOperation =>
  ([low, high]) =>
    high < 0 ? emptyInterval : increasing(of, [Math.max(low, 0), high]);

const abs: IntervalOperation = ([low, high]) => {
  if (low >= 0) return [low, high];
  return high <= 0 ? [-high, -low] : [0, Math.max(-low, high)];
};

function integerPower(base: Interval, exponent: number): Interval {
  if (exponent < 0) return dividedBy(trueInterval, integerPower(base, -exponent));
  const even = exponent % 2 === 0;
  return increasing((x) => x ** exponent, even ? abs(base, falseInterval, falseInterval) : base);
}

const power: IntervalOperation = (base, exponent) => {
  const [low, high] = exponent;
  if (low === high && Number.isInteger(low) && Math.abs(low) < 1e6) return integerPower(base, low);
  if (base[1] < 0) return emptyInterval;
  const positive: Interval = [Math.max(base[0], 0), base[1]];
  const corners = [
    positive[0] ** low,
    positive[0] ** high,
    positive[1] ** low,
    positive[1] ** high,
    // The power changes from decreasing to increasing at 1 and 0.
    ...(positive[0] < 1 && positive[1] > 1 ? [1] : []),
    ...(low < 0 && high > 0 ? [1] : []),
  ].filter((value) => !Number.isNaN(value));
  return roundOutward(Math.min(...corners), Math.max(...corners));
};

/** Whether place + a multiple of 2 pi lies in the interval, up to rounding. */
function reachesPhase(place: number, [low, high]: Interval): boolean {
  const turn = 2 * Math.PI;
  const slack = 1e-9 * Math.max(1, Math.abs(low), Math.abs(high));
  return Math.ceil((low - slack - place) / turn) * turn + place <= high + slack;
}

/** Sine or cosine, which is 1 at the peak and -1 at pi from it. */
const sinusoid =
  (of: (x: number) => number, peak: number): IntervalOperation =>
  ([low, high]) => {
    if (!(high - low < 2 * Math.PI)) return [-1, 1];
    const ends = [of(low), of(high)];
    const least = reachesPhase(peak + Math.PI, [low, high]) ? -1 : Math.min(...ends);
    return roundOutward(least, reachesPhase(peak, [low, high]) ? 1 : Math.max(...ends));
  };

const tan: IntervalOperation = ([low, high]) => {
  const crosses = Math.floor(low / Math.PI + 0.5) !== Math.floor(high / Math.PI + 0.5);
  return crosses || !(high - low < Math.PI) ? wholeLine : increasing(Math.tan, [low, high]);
};

const mod: IntervalOperation = (x, divisor) =>
  contains(divisor, 0) ? wholeLine : minus(x, times(divisor, increasing(Math.floor, dividedBy(x, divisor))));

/** Interval extension of every operation: the result contains the value at each point of the arguments. */
export const intervalOperations: Readonly<Record<Operator, IntervalOperation>> = {
  add: plus,
  subtract: minus,
  multiply: times,
  divide: dividedBy,
  power,
  negate: ([low, high]) => [-high, -low],
  less: (a, b) => truthInterval(a[1] < b[0], a[0] >= b[1]),
  lessOrEqual: (a, b) => truthInterval(a[1] <= b[0], a[0] > b[1]),
  equal: (a, b) => truthInterval(a[0] === a[1] && a[0] === b[0] && b[0] === b[1], a[1] < b[0] || b[1] < a[0]),
  and: (a, b) => [a[0] * b[0], a[1] * b[1]],
  or: (a, b) => [Math.max(a[0], b[0]), Math.max(a[1], b[1])],
  not: ([low, high]) => [1 - high, 1 - low],
  choose: (condition, a, b) => (condition[0] === 1 ? a : condition[1] === 0 ? b : hull(a, b)),
  exp: (a) => increasing(Math.exp, a),
  log: onNonNegative(Math.log),
  log10: onNonNegative(Math.log10),
  sqrt: onNonNegative(Math.sqrt),
  abs,
  sign: (a) => increasing(Math.sign, a),
  min: (a, b) => [Math.min(a[0], b[0]), Math.min(a[1], b[1])],
  max: (a, b) => [Math.max(a[0], b[0]), Math.max(a[1], b[1])],
  floor: (a) => increasing(Math.floor, a),
  ceil: (a) => increasing(Math.ceil, a),
  round: (a, digits) => increasing((x) => roundTo(x, digits[0]), a),
  mod,
  sin: sinusoid(Math.sin, Math.PI / 2),
  cos: sinusoid(Math.cos, 0),
  tan,
  asin: ([low, high]) =>
    low > 1 || high < -1 ? emptyInterval : increasing(Math.asin, [Math.max(low, -1), Math.min(high, 1)]),
};
