import type { Shape } from "./continuous.js";
import { betaTails } from "./incomplete-beta.js";
import { gammaTails } from "./incomplete-gamma.js";
import { normalAt } from "./normal.js";
import { binomialProbability, poissonProbability } from "./point-probability.js";
import type { Tails } from "./tails.js";

/** Room for rounding, so that the quantile of a cumulative probability is the count it belongs to. */
const rounding = 1e-12;

/** What tells one distribution of counts from another. */
interface Counts {
  readonly mean: number;
  readonly sd: number;
  readonly highest: number;
  /** Probability of exactly the whole number. */
  readonly point: (count: number) => number;
  /** Probabilities of at most and of more than the whole number. */
  readonly tails: (count: number) => Tails;
}

export function poissonShape(mean: number): Shape {
  return countShape({
    mean,
    sd: Math.sqrt(mean),
    highest: Number.POSITIVE_INFINITY,
    point: (count) => poissonProbability(count, mean),
    tails: (count) => turned(gammaTails(count + 1, mean)),
  });
}

export function binomialShape(size: number, probability: number): Shape {
  const failure = 1 - probability;
  return countShape({
    mean: size * probability,
    sd: Math.sqrt(size * probability * failure),
    highest: size,
    point: (count) => binomialProbability(count, size - count, probability, failure),
    tails: (count) => turned(betaTails(count + 1, size - count, probability, failure)),
  });
}

/** Counts whose variance is mean + mean^2 / size. */
export function negativeBinomialShape(mean: number, size: number): Shape {
  const [success, failure] = [size / (size + mean), mean / (size + mean)];
  return countShape({
    mean,
    sd: Math.sqrt(mean + (mean * mean) / size),
    highest: Number.POSITIVE_INFINITY,
    point: (count) => (size / (size + count)) * binomialProbability(size, count, success, failure),
    tails: (count) => betaTails(size, count + 1, success, failure),
  });
}

/** At most so many events means that the continuous variable behind them lies above its limit. */
function turned({ lower, upper }: Tails): Tails {
  return { lower: upper, upper: lower };
}

function countShape({ mean, sd, highest, point, tails }: Counts): Shape {
  const inside = (value: number): boolean => value >= 0 && value <= highest && Number.isInteger(value);
  const tailsAt = (value: number): Tails => {
    if (value < 0) return { lower: 0, upper: 1 };
    return value >= highest ? { lower: 1, upper: 0 } : tails(Math.floor(value));
  };
  return {
    density: (value) => (inside(value) ? point(value) : 0),
    tails: tailsAt,
    at({ lower, upper, given }) {
      if (lower === 0 || mean === 0) return 0;
      if (upper === 0) return highest;
      const room = rounding * Math.min(lower, upper);
      const reached = (count: number): boolean =>
        given === "upper"
          ? tailsAt(count).upper <= upper * (1 + 2 * Number.EPSILON) + room
          : tailsAt(count).lower >= lower * (1 - 2 * Number.EPSILON) - room;
      const guess = Math.floor(mean + sd * normalAt(lower, upper));
      return firstReached(reached, Math.min(Math.max(guess, 0), highest));
    },
  };
}

/** The lowest count at which a condition holds that holds for all counts above it too. */
function firstReached(reached: (count: number) => boolean, guess: number): number {
  let high = guess;
  for (let step = 1; !reached(high); step *= 2) high += step;
  let low = high === guess ? guess - 1 : guess;
  for (let step = 1; low >= 0 && reached(low); step *= 2) {
    high = low;
    low -= step;
  }
  low = Math.max(low, -1);
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (reached(middle)) high = middle;
    else low = middle;
  }
  return high;
}
