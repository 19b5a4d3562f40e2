import { betaTails } from "./incomplete-beta.js";
import { gammaTails } from "./incomplete-gamma.js";
import { stirlingError } from "./log-gamma.js";
import { normalAt, normalCdf, normalDensity, normalUpperTail } from "./normal.js";
import { poissonProbability } from "./point-probability.js";
import {
  type Tails,
  type TailsWithSlope,
  tailsFromLower,
  tailsFromUpper,
  type WantedTails,
} from "./tails.js";
import { valueWithTails } from "./value-with-tails.js";

/** What a distribution can be asked for; values and probabilities are taken as checked. */
export interface Shape {
  readonly density: (value: number) => number;
  readonly tails: (value: number) => Tails;
  /** The value with these probabilities below and above it, of which the smaller one counts. */
  readonly at: (wanted: WantedTails) => number;
}

export function normalShape(mean: number, sd: number): Shape {
  const standard = (value: number): number => (value - mean) / sd;
  return {
    density: (value) => normalDensity(standard(value)) / sd,
    tails: (value) => ({ lower: normalCdf(standard(value)), upper: normalUpperTail(standard(value)) }),
    at: ({ lower, upper }) => mean + sd * normalAt(lower, upper),
  };
}

export function lognormalShape(meanLog: number, sdLog: number): Shape {
  const logs = normalShape(meanLog, sdLog);
  return {
    density: (value) => (value > 0 ? logs.density(Math.log(value)) / value : 0),
    tails: (value) => logs.tails(Math.log(Math.max(value, 0))),
    at: (wanted) => Math.exp(logs.at(wanted)),
  };
}

/** Gamma distribution; the mean is shape times scale. */
export function gammaShape(shape: number, scale: number): Shape {
  const density = (x: number): number => (x > 0 ? (shape / x) * poissonProbability(shape, x) : atZero(shape));
  return {
    density: (value) =>
      value < 0 || value === Number.POSITIVE_INFINITY ? 0 : density(value / scale) / scale,
    tails: (value) => gammaTails(shape, value / scale),
    at(wanted) {
      // The cube root of a gamma variable is nearly normal (Wilson and Hilferty).
      const root = 1 - 1 / (9 * shape) + normalAt(wanted.lower, wanted.upper) / (3 * Math.sqrt(shape));
      const start = root > 0.1 ? shape * root ** 3 : shape;
      return scale * valueWithTails((x) => gammaTails(shape, x), wanted, start);
    },
  };
}

/** A density that goes as x^(power - 1) near 0, at 0, the factor being 1. */
function atZero(power: number): number {
  if (power === 1) return 1;
  return power > 1 ? 0 : Number.POSITIVE_INFINITY;
}

export function exponentialShape(mean: number): Shape {
  return {
    density: (value) => (value < 0 ? 0 : Math.exp(-value / mean) / mean),
    tails: (value) =>
      value > 0
        ? { lower: -Math.expm1(-value / mean), upper: Math.exp(-value / mean) }
        : { lower: 0, upper: 1 },
    at: ({ lower, upper }) => -mean * (lower < upper ? Math.log1p(-lower) : Math.log(upper)),
  };
}

/** The odds x/(1 - x) of a beta variable x, through which beta, F and t keep their digits near either end. */
function betaOdds(a: number, b: number): Shape {
  const tails = (odds: number): TailsWithSlope => {
    if (odds === Number.POSITIVE_INFINITY) return tailsFromUpper(0);
    return odds > 0 ? betaTails(a, b, odds / (1 + odds), 1 / (1 + odds)) : tailsFromLower(0);
  };
  return {
    density: (odds) => (odds > 0 ? tails(odds).slope / odds : b * atZero(a)),
    tails,
    at(wanted) {
      const z = normalAt(wanted.lower, wanted.upper);
      return valueWithTails(tails, wanted, (a / b) * Math.exp(z * Math.sqrt(1 / a + 1 / b)));
    },
  };
}

export function betaShape(a: number, b: number): Shape {
  const odds = betaOdds(a, b);
  const oddsOf = (value: number): number =>
    value >= 1 ? Number.POSITIVE_INFINITY : Math.max(value, 0) / (1 - value);
  const inside = (value: number): number => (odds.density(oddsOf(value)) * (1 + oddsOf(value))) / (1 - value);
  return {
    density: (value) => (value < 0 || value > 1 ? 0 : value === 1 ? a * atZero(b) : inside(value)),
    tails: (value) => odds.tails(oddsOf(value)),
    at(wanted) {
      const found = odds.at(wanted);
      return found === Number.POSITIVE_INFINITY ? 1 : found / (1 + found);
    },
  };
}

export function fShape(numerator: number, denominator: number): Shape {
  const odds = betaOdds(numerator / 2, denominator / 2);
  const ratio = numerator / denominator;
  return {
    density: (value) =>
      value < 0 || value === Number.POSITIVE_INFINITY ? 0 : ratio * odds.density(ratio * value),
    tails: (value) => odds.tails(ratio * value),
    at: (wanted) => odds.at(wanted) / ratio,
  };
}

/** Student's t: its square is an F variable with 1 and the given degrees of freedom. */
export function studentShape(degrees: number): Shape {
  const odds = betaOdds(0.5, degrees / 2);
  return {
    density(value) {
      const half = 0.5 * (degrees + 1);
      // Gamma((n + 1)/2) / Gamma(n/2) by Stirling's formula for both, and (1 + value^2/n)^-((n + 1)/2).
      const stirling = stirlingError(half) - stirlingError(0.5 * degrees) - 0.5;
      const power = Math.log1p(1 / degrees) - Math.log1p((value * value) / degrees);
      return 0.5 * Math.exp(stirling + half * power) * Math.sqrt(degrees / (half * Math.PI));
    },
    tails(value) {
      const { lower, upper } = odds.tails((value * value) / degrees);
      const far = 0.5 * upper;
      const near = 0.5 + 0.5 * lower;
      return value < 0 ? { lower: far, upper: near } : { lower: near, upper: far };
    },
    at({ lower, upper }) {
      const tail = Math.min(lower, upper);
      const found = Math.sqrt(degrees * odds.at({ lower: 1 - 2 * tail, upper: 2 * tail }));
      return lower < upper ? -found : found;
    },
  };
}

export function uniformShape(low: number, high: number): Shape {
  const share = (value: number): number => Math.min(Math.max((value - low) / (high - low), 0), 1);
  return {
    density: (value) => (value < low || value > high ? 0 : 1 / (high - low)),
    tails: (value) => ({ lower: share(value), upper: share(low + high - value) }),
    at: ({ lower, upper }) => (lower < upper ? low + lower * (high - low) : high - upper * (high - low)),
  };
}
