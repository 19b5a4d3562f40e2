import type { Interval, Rule } from "../../rule/index.js";
import { missingPeriod, oneStateOnly, unreadableOption } from "../refusals.js";
import { type Multiplier, multipliersOf } from "../rest/multiplier.js";
import { type Stability, stabilityOf } from "../rest/stability.js";
import { type HeldSetting, type HeldStep, holdStep } from "../setting/held-step.js";
import { type SearchRange, searchRanges } from "../setting/search-range.js";
import { cyclesOfOneState, slopeAlong } from "./cycle-points.js";

/** Values that come round again after a number of periods, and not before. */
export interface Cycle extends Stability {
  /** The values in turn, the lowest first. */
  readonly points: readonly number[];
  /** Product of the slopes along the cycle. */
  readonly multiplier: Multiplier;
  /** Largest gap between a step from one point and the next point. */
  readonly residual: number;
  /** A multiplier of zero: gaps vanish faster than by any factor. */
  readonly superstable: boolean;
  readonly sentence: string;
}

export interface Cycles {
  readonly kind: "cycles";
  readonly rule: Rule;
  readonly period: number;
  readonly parameters: Readonly<Record<string, number>>;
  readonly range: Interval;
  readonly cycles: readonly Cycle[];
  /** `every` = none in the range can be missing; `cut-short` = the search ran out of patience. */
  readonly search: "every" | "cut-short";
}

export interface CyclesOptions extends HeldSetting {
  /** Periods until the values come round. */
  readonly period: number;
  /**
   * Lowest and highest value to look at, for a system by state; default the rule's bounds, or as far as its
   * parameters and its turns from rising to falling suggest.
   */
  readonly range?: SearchRange;
}

const shown = (value: number): string => String(Number(value.toPrecision(6)));

function described(held: HeldStep, points: readonly number[]): Cycle {
  const { slope, residual } = slopeAlong(held, points);
  const [multiplier] = multipliersOf(Float64Array.of(slope), 1);
  const stability = stabilityOf([multiplier!]);
  const list = points.map(shown).join(", ");
  return {
    points: [...points],
    multiplier: multiplier!,
    residual,
    superstable: Math.abs(slope) < 1e-9,
    ...stability,
    sentence: `The cycle of ${points.length} values ${list} ${stability.words}.`,
  };
}

/**
 * Finds all cycles of a period by solving f(f(...x)) = x over a range, not by waiting for values to repeat: unstable
 * ones are found too, and none in the range is lost.
 *
 * @throws {ModelError} `period-missing` | `one-state-only` | `unreadable-option` | `missing-value` | `rule-changes-with-time`.
 * @example cycles(recurrence("x[t+1] = 3.2*x*(1 - x)"), { period: 2, range: [0, 1] }).cycles[0].multiplier.re.toFixed(6); // "0.160000"
 */
export function cycles(rule: Rule, options: CyclesOptions): Cycles {
  const period = options?.period;
  if (period === undefined) throw missingPeriod();
  if (rule.states.length !== 1 || rule.lags.length > 0) throw oneStateOnly("A cycle", rule.states);
  if (!Number.isSafeInteger(period) || period < 1 || period > 64) {
    throw unreadableOption("period", "a whole number from 1 to 64", period);
  }
  const held = holdStep(rule, options, "cycle");
  const within = searchRanges(held, options.range)[0]!;
  const found = cyclesOfOneState(held, period, within);
  return {
    kind: "cycles",
    rule,
    period,
    parameters: Object.fromEntries(rule.parameters.map((name, i) => [name, held.parameters[i]!])),
    range: within,
    cycles: found.cycles.map((points) => described(held, points)),
    search: found.complete ? "every" : "cut-short",
  };
}
