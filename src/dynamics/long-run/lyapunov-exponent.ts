import { type RunHooks, studentQuantile, ticker } from "../../numeric/index.js";
import type { Rule } from "../../rule/index.js";
import { pathLeaves, unreadableOption } from "../refusals.js";
import { type HeldSetting, type HeldStep, holdStep } from "../setting/held-step.js";
import { type InitialValues, initialVector } from "../setting/setting.js";

export interface LyapunovExponentOptions extends HeldSetting, RunHooks {
  /**
   * First values by state, with lags a list, oldest first; those that the rule states or the fit estimates
   * may be left out.
   */
  readonly initial?: InitialValues;
  /** Periods measured, at least 300; default 100,000. */
  readonly periods?: number;
  /** Periods left out at the beginning; default 1,000. */
  readonly discard?: number;
  /** Confidence level of the interval, between 0 and 1; default 0.95. */
  readonly level?: number;
}

/** The mean logarithm of the factor by which a small gap grows in a period. */
export interface LyapunovExponent {
  readonly kind: "lyapunov-exponent";
  readonly rule: Rule;
  /** Per period. */
  readonly value: number;
  /** From the spread of the means of 30 blocks; rounding is always added. */
  readonly interval: readonly [number, number];
  readonly level: number;
  readonly periods: number;
  /** Running mean after each block, [30]: it should have settled. */
  readonly settling: Float64Array;
  readonly verdict: "chaotic" | "not chaotic" | "undecided";
  readonly sentence: string;
}

const blocks = 30;

/** Steps taken between two looks at a gap: few enough for its size to stay within the numbers of a computer. */
const leapLength = 8;

/** Follows a point and a small gap; gives the logarithm of the gap's growth over some steps. */
function gapFollower(held: HeldStep, state: Float64Array): (periods: number) => number {
  const { width } = held;
  const gap = new Float64Array(width).fill(1 / Math.sqrt(width));
  const moved = new Float64Array(width);
  const leap = (periods: number): number => {
    const matrix = held.leap(state, periods);
    let square = 0;
    for (let i = 0; i < width; i++) {
      let sum = 0;
      for (let j = 0; j < width; j++) sum += matrix[i * width + j]! * gap[j]!;
      moved[i] = sum;
      square += sum * sum;
    }
    const size = Math.sqrt(square);
    for (let i = 0; i < width && size > 0; i++) gap[i] = moved[i]! / size;
    return Math.log(size);
  };
  return (periods) => {
    let sum = 0;
    for (let left = periods; left > 0; left -= leapLength) sum += leap(Math.min(left, leapLength));
    return sum;
  };
}

function sentenceOf(
  verdict: LyapunovExponent["verdict"],
  value: number,
  interval: readonly [number, number],
): string {
  const shown = [value, ...interval].map((one) => String(Number(one.toPrecision(4))));
  const size = `${shown[0]} a period (${shown[1]} to ${shown[2]})`;
  if (verdict === "chaotic")
    return `Small gaps grow by a logarithm of ${size}: single paths cannot be foretold for long.`;
  if (verdict === "not chaotic") return `Small gaps shrink, by a logarithm of ${size}: paths run together.`;
  return `Whether small gaps grow or shrink is undecided, with a logarithm of ${size}.`;
}

/**
 * Measures the Lyapunov exponent of a rule with known parameters: the mean of log |slope| along a path, for systems
 * that of the largest growth of a small gap.
 *
 * @throws {ModelError} `path-leaves` where the path leaves the finite range; `unreadable-option` | `missing-value`.
 * @example lyapunovExponent(recurrence("x[t+1] = 2.5*x*(1 - x)"), { initial: { x: 0.3 }, periods: 3000 }).value.toFixed(4); // "-0.6931"
 */
export function lyapunovExponent(rule: Rule, options: LyapunovExponentOptions = {}): LyapunovExponent {
  const { periods = 100_000, discard = 1_000, level = 0.95 } = options;
  if (!Number.isSafeInteger(periods) || periods < 300)
    throw unreadableOption("periods", "a whole number from 300", periods);
  const held = holdStep(rule, options, "exponent");
  const grown = gapFollower(held, initialVector(rule, options.initial));
  grown(discard);
  const size = Math.floor(periods / blocks);
  const tick = ticker(options, blocks);
  const means = Float64Array.from({ length: blocks }, () => {
    tick();
    return grown(size) / size;
  });
  const value = means.reduce((sum, mean) => sum + mean, 0) / blocks;
  if (Number.isNaN(value) || value === Number.POSITIVE_INFINITY) throw pathLeaves("An exponent");
  const variance = means.reduce((sum, mean) => sum + (mean - value) ** 2, 0) / (blocks - 1);
  const spread = Number.isFinite(value)
    ? studentQuantile((1 + level) / 2, blocks - 1) * Math.sqrt(variance / blocks)
    : 0;
  const reach = spread + 1e-11 * Math.max(1, Math.abs(value));
  const interval: readonly [number, number] = [value - reach, value + reach];
  const verdict = interval[0] > 0 ? "chaotic" : interval[1] < 0 ? "not chaotic" : "undecided";
  let sum = 0;
  const settling = means.map((mean, i) => {
    sum += mean;
    return sum / (i + 1);
  });
  return {
    kind: "lyapunov-exponent",
    rule,
    value,
    interval,
    level,
    periods: size * blocks,
    settling,
    verdict,
    sentence: sentenceOf(verdict, value, interval),
  };
}
