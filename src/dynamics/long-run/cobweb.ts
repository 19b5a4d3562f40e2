import type { Rule } from "../../rule/index.js";
import { oneStateOnly } from "../refusals.js";
import { type Equilibrium, equilibria } from "../rest/equilibria.js";
import { type HeldSetting, holdStep } from "../setting/held-step.js";
import { trajectory } from "../trajectory/trajectory.js";

export interface CobwebOptions extends HeldSetting {
  /** First value by state. */
  readonly initial: Readonly<Record<string, number>>;
  /** Periods shown; default 30. */
  readonly periods?: number;
}

/** Next value against present value, with the steps of one path between the curve and the line of no change. */
export interface Cobweb {
  readonly kind: "cobweb";
  readonly rule: Rule;
  readonly state: string;
  /** [points] present values, and next and second next values there. */
  readonly present: Float64Array;
  readonly next: Float64Array;
  readonly secondNext: Float64Array;
  /** Corners of the web: x and y, [2 periods + 1]. */
  readonly web: { readonly x: Float64Array; readonly y: Float64Array };
  /** Those on the range shown. */
  readonly equilibria: readonly Equilibrium[];
}

/** Points of the curve: enough for a smooth line at page width. */
const curvePoints = 200;

/** Corners (x0, x0), (x0, x1), (x1, x1), (x1, x2), ... */
function corners(values: Float64Array): Cobweb["web"] {
  const count = 2 * values.length - 1;
  return {
    x: Float64Array.from({ length: count }, (_, i) => values[Math.floor(i / 2)]!),
    y: Float64Array.from({ length: count }, (_, i) => values[Math.ceil(i / 2)]!),
  };
}

/**
 * The data of a cobweb: the curve of the rule, its second iterate, the web of a path, and the equilibria in view.
 *
 * @throws {ModelError} `one-state-only` | `missing-value` | `rule-changes-with-time`.
 * @example cobweb(recurrence("x[t+1] = 0.5*x + 1"), { initial: { x: 0 }, periods: 2 }).web.y; // 0, 1, 1, 1.5, 1.5
 */
export function cobweb(rule: Rule, options: CobwebOptions): Cobweb {
  const { periods = 30 } = options;
  if (rule.states.length !== 1 || rule.lags.length > 0) throw oneStateOnly("A cobweb", rule.states);
  const held = holdStep(rule, options, "cobweb");
  const [state] = rule.states;
  const run = trajectory(rule, { ...options, periods });
  const values = run.values[state!]!;
  const least = values.reduce((low, value) => Math.min(low, value), Number.POSITIVE_INFINITY);
  const most = values.reduce((high, value) => Math.max(high, value), Number.NEGATIVE_INFINITY);
  const room = 0.1 * (most - least || Math.abs(most) || 1);
  const lowest = least >= 0 ? Math.max(0, least - room) : least - room;
  const within = [lowest, most + room] as const;
  const present = Float64Array.from(
    { length: curvePoints },
    (_, i) => within[0] + ((within[1] - within[0]) * i) / (curvePoints - 1),
  );
  const stepped = (from: Float64Array): Float64Array =>
    from.map((x) => {
      const at = Float64Array.of(x);
      held.step(at, at);
      return at[0]!;
    });
  const next = stepped(present);
  return {
    kind: "cobweb",
    rule,
    state: state!,
    present,
    next,
    secondNext: stepped(next),
    web: corners(values),
    equilibria: equilibria(rule, { ...options, range: within }).points,
  };
}
