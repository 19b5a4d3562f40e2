import { compileRule, type Rule, readsPeriod } from "../../rule/index.js";
import { changesWithTime, strangeName, unreadableOption } from "../refusals.js";
import { type HeldSetting, holdStep } from "../setting/held-step.js";
import { initialVector } from "../setting/setting.js";

export interface AttractorOptions extends Omit<HeldSetting, "inputs"> {
  /** The constant that is varied. */
  readonly constant: string;
  readonly from: number;
  readonly to: number;
  /** Values of the constant; default 600. */
  readonly columns?: number;
  /** Values kept at each; default 300. */
  readonly points?: number;
  /** Periods left out before; default 500. */
  readonly discard?: number;
  /** First values of the one state to start from: several show attractors that exist side by side. */
  readonly starts: readonly number[];
  /** What a fit says of the constant, to be marked. */
  readonly estimate?: { readonly value: number; readonly interval: readonly [number, number] };
}

/** Where a rule goes in the long run, against one of its constants. */
export interface Attractor {
  readonly kind: "attractor";
  readonly rule: Rule;
  readonly constant: string;
  readonly state: string;
  /** [columns] */
  readonly at: Float64Array;
  /** [columns, starts * points], NaN where the path leaves the finite range. */
  readonly values: Float64Array;
  readonly perColumn: number;
  readonly estimate: AttractorOptions["estimate"] | undefined;
}

function whole(name: string, value: number): number {
  if (Number.isSafeInteger(value) && value >= 1) return value;
  throw unreadableOption(name, "a whole number from 1 on", value);
}

/**
 * Values that remain when the beginning has died away, for many values of one constant: a bifurcation diagram as
 * data, with the estimate and its interval to be marked on the axis.
 *
 * @throws {ModelError} `unknown-name` | `missing-value` | `unreadable-option` | `rule-changes-with-time`.
 * @example attractor(recurrence("x[t+1] = r*x*(1 - x)"), { constant: "r", from: 2, to: 4, columns: 3, points: 2, starts: [0.3] }).at; // 2, 3, 4
 */
export function attractor(rule: Rule, options: AttractorOptions): Attractor {
  const { constant, from, to, starts, estimate } = options;
  const columns = whole("columns", options.columns ?? 600);
  const points = whole("points", options.points ?? 300);
  const discard = options.discard ?? 500;
  const slot = rule.constants.indexOf(constant);
  if (slot < 0) throw strangeName("constant", constant, rule.constants);
  if (readsPeriod(rule)) throw changesWithTime("attractor");
  const { constants, width } = holdStep(
    rule,
    { constants: { ...options.constants, [constant]: from } },
    "attractor",
  );
  const [state] = rule.states;
  const { path } = compileRule(rule);
  const perColumn = starts.length * points;
  const at = Float64Array.from(
    { length: columns },
    (_, i) => from + ((to - from) * i) / Math.max(1, columns - 1),
  );
  const values = new Float64Array(columns * perColumn);
  const table = new Float64Array((discard + points) * width);
  const firsts = starts.map((start) => initialVector(rule, everywhere(rule, start)));
  for (let column = 0; column < columns; column++) {
    constants[slot] = at[column]!;
    firsts.forEach((first, k) => {
      path(first, constants, [], 0, discard + points - 1, table);
      const place = column * perColumn + k * points;
      for (let i = 0; i < points; i++) {
        const value = table[(discard + i) * width]!;
        values[place + i] = Number.isFinite(value) ? value : Number.NaN;
      }
    });
  }
  return Object.freeze({ kind: "attractor", rule, constant, state: state!, at, values, perColumn, estimate });
}

/** The same first value for every state and every past value that the rule reads. */
function everywhere(rule: Rule, start: number): Record<string, readonly number[]> {
  const lags = (state: string): number => rule.memory.filter((kept) => kept.state === state).length;
  return Object.fromEntries(
    rule.states.map((state) => [state, new Array<number>(lags(state) + 1).fill(start)]),
  );
}
