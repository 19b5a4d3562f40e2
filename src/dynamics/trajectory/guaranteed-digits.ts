import {
  type Interval,
  intervalAlgebra,
  type Rule,
  type StepArgumentsOver,
  stepOver,
} from "../../rule/index.js";
import { type HeldSetting, holdStep } from "../setting/held-step.js";
import { type InitialValues, initialVector } from "../setting/setting.js";

export interface GuaranteedOptions extends HeldSetting {
  readonly initial?: InitialValues;
  /** Significant digits that are to be right. Default 10. */
  readonly digits?: number;
  /** How far to look. Default 1000. */
  readonly periods?: number;
}

/** How far a path in computer numbers keeps its digits. */
export interface GuaranteedDigits {
  readonly digits: number;
  /** The last period up to which every value is right to that many digits. */
  readonly periods: number;
  /** True when nothing was lost in all the periods looked at. */
  readonly throughout: boolean;
}

const middle = ([low, high]: Interval): number => low + (high - low) / 2;
const exactly = (value: number): Interval => [value, value];
const around = (center: number, radius: number): Interval => [center - radius, center + radius];
const size = ([low, high]: Interval): number => Math.max(Math.abs(low), Math.abs(high));

/** A place known to within a radius in every slot. */
interface Known {
  readonly center: readonly number[];
  readonly radius: readonly number[];
}

/** The next place: what rounding adds, and what the slopes make of the radius so far. */
function advance(
  rule: Rule,
  known: Known,
  place: (state: readonly Interval[]) => StepArgumentsOver<Interval>,
): Known {
  const step = stepOver(rule, intervalAlgebra);
  const rounded = step.next(place(known.center.map(exactly)));
  const slopes = step.slopes(place(known.center.map((value, i) => around(value, known.radius[i]!))));
  const center = rounded.map(middle);
  const radius = rounded.map((value, i) => {
    const carried = slopes[i]!.reduce((sum, slope, j) => {
      const own = known.radius[j]!;
      return own === 0 ? sum : sum + size(slope) * own;
    }, 0);
    return ((value[1] - value[0]) / 2 + carried) * (1 + 1e-12);
  });
  return { center, radius };
}

/**
 * Finds up to which period a path in computer numbers keeps a number of significant digits, by bounds on every
 * rounding error and on what the slopes of the step make of it. The bound is safe, so the truth may hold longer.
 *
 * @throws {ModelError} `missing-value` | `wrong-history` | `rule-changes-with-time`.
 * @see Moore, Kearfott and Cloud (2009), Introduction to Interval Analysis, chapter 6: the mean value form.
 * @example guaranteedDigits(recurrence("x[t+1] = 4*x*(1 - x)"), { initial: { x: 0.3 }, digits: 6 }).periods < 40; // true
 */
export function guaranteedDigits(rule: Rule, options: GuaranteedOptions = {}): GuaranteedDigits {
  const { digits = 10, periods = 1000 } = options;
  const held = holdStep(rule, options, "number of steps to which digits are kept");
  const parameters = Array.from(held.parameters, exactly);
  const inputs = Array.from(held.inputs, exactly);
  const place = (state: readonly Interval[]): StepArgumentsOver<Interval> => ({
    state,
    parameters,
    input: (slot) => inputs[slot]!,
    t: [0, 0],
  });
  const start = initialVector(rule, options.initial);
  let known: Known = { center: [...start], radius: [...start].map(() => 0) };
  for (let t = 1; t <= periods; t++) {
    known = advance(rule, known, place);
    const kept = known.center.every(
      (value, i) => known.radius[i]! <= 0.5 * 10 ** -digits * Math.abs(value) || known.radius[i] === 0,
    );
    if (!kept) return { digits, periods: t - 1, throughout: false };
  }
  return { digits, periods, throughout: true };
}
