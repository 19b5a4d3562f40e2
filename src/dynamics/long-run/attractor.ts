import { type RunHooks, ticker } from "../../numeric/index.js";
import { compileRule, dependsOnPeriod, type Rule } from "../../rule/index.js";
import { changesWithTime, strangeName, unreadableOption } from "../refusals.js";
import { type HeldSetting, holdStep } from "../setting/held-step.js";
import { initialVector } from "../setting/setting.js";

export interface AttractorOptions extends Omit<HeldSetting, "inputs">, RunHooks {
  /** Parameter that is varied. */
  readonly vary: string;
  /** Values of the parameter: a list, or two ends with how many. */
  readonly values:
    | readonly number[]
    | {
        /** First value. */
        readonly from: number;
        /** Last value. */
        readonly to: number;
        /** How many values, ends included; default 600. */
        readonly count?: number;
      };
  /** Periods kept at each value; default 300. */
  readonly periods?: number;
  /** Periods left out before; default 500. */
  readonly discard?: number;
  /** First values of the one state to start from: several show attractors that exist side by side. */
  readonly initial: number | readonly number[];
  /** What a fit says of the parameter, to be marked; default the estimate of the fit given. */
  readonly estimate?: {
    /** Estimate of the parameter. */
    readonly value: number;
    /** Its interval. */
    readonly interval: readonly [number, number];
  };
}

/** Where a rule goes in the long run, against one of its parameters. */
export interface Attractor {
  readonly kind: "attractor";
  readonly rule: Rule;
  readonly vary: string;
  readonly state: string;
  /** [values] */
  readonly at: Float64Array;
  /** [values, initial values * periods], NaN where the path leaves the finite range. */
  readonly values: Float64Array;
  readonly perColumn: number;
  readonly estimate: AttractorOptions["estimate"] | undefined;
}

function whole(name: string, value: number): number {
  if (Number.isSafeInteger(value) && value >= 1) return value;
  throw unreadableOption(name, "a whole number from 1 on", value);
}

/** The values of the varied parameter; two ends stand for 600 values unless `count` says otherwise. */
function valuesOf(values: AttractorOptions["values"]): Float64Array {
  if (!("from" in values)) return Float64Array.from(values);
  const count = whole("values.count", values.count ?? 600);
  const { from, to } = values;
  return Float64Array.from({ length: count }, (_, i) => from + ((to - from) * i) / Math.max(1, count - 1));
}

/**
 * Values that remain when the beginning has died away, for many values of one parameter: a bifurcation diagram as
 * data, with the estimate and its interval to be marked on the axis.
 *
 * @throws {ModelError} `unknown-name` | `missing-value` | `unreadable-option` | `rule-changes-with-time`.
 * @example attractor(recurrence("x[t+1] = r*x*(1 - x)"), { vary: "r", values: [2, 3, 4], periods: 2, initial: 0.3 }).at; // 2, 3, 4
 */
export function attractor(rule: Rule, options: AttractorOptions): Attractor {
  const { vary, estimate } = options;
  const at = valuesOf(options.values);
  const columns = at.length;
  const starts = typeof options.initial === "number" ? [options.initial] : options.initial;
  const points = whole("periods", options.periods ?? 300);
  const discard = options.discard ?? 500;
  const slot = rule.parameters.indexOf(vary);
  if (slot < 0) throw strangeName("parameter", vary, rule.parameters);
  if (dependsOnPeriod(rule)) throw changesWithTime("attractor");
  const { parameters, width } = holdStep(
    rule,
    { parameters: { ...options.parameters, [vary]: at[0]! } },
    "attractor",
  );
  const [state] = rule.states;
  const { path } = compileRule(rule);
  const perColumn = starts.length * points;
  const values = new Float64Array(columns * perColumn);
  const table = new Float64Array((discard + points) * width);
  const firsts = starts.map((start) => initialVector(rule, everywhere(rule, start)));
  const tick = ticker(options, columns);
  for (let column = 0; column < columns; column++) {
    tick();
    parameters[slot] = at[column]!;
    firsts.forEach((first, k) => {
      path(first, parameters, [], 0, discard + points - 1, table);
      const place = column * perColumn + k * points;
      for (let i = 0; i < points; i++) {
        const value = table[(discard + i) * width]!;
        values[place + i] = Number.isFinite(value) ? value : Number.NaN;
      }
    });
  }
  return { kind: "attractor", rule, vary, state: state!, at, values, perColumn, estimate };
}

/** The same first value for every state and every past value that the rule reads. */
function everywhere(rule: Rule, start: number): Record<string, readonly number[]> {
  const lags = (state: string): number => rule.lags.filter((kept) => kept.state === state).length;
  return Object.fromEntries(
    rule.states.map((state) => [state, new Array<number>(lags(state) + 1).fill(start)]),
  );
}
