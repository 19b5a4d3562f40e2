import {
  type Interval,
  intervalAlgebra,
  type Rule,
  type StateBound,
  stateBounds,
  stepOver,
} from "../rule/index.js";
import type { NoiseDraw } from "./noise/noise.js";

/** The bounds of every state in a run; a state that chance makes a count is none below 0. */
export function runBounds(rule: Rule, change: readonly (NoiseDraw | undefined)[]): readonly StateBound[] {
  return stateBounds(rule).map((bound, s) => {
    const least = change[s]?.least;
    return least === undefined || bound.low >= least ? bound : { ...bound, low: least, absorbsLow: true };
  });
}

const anything: Interval = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];

/**
 * Within which values an observation of each state lies: the state's bounds, and what the rule can give at all, as
 * `max(0, ...)` gives nothing below 0.
 */
export function observableRange(rule: Rule): readonly Interval[] {
  const next = stepOver(rule, intervalAlgebra).next({
    state: new Array<Interval>(rule.states.length + rule.lags.length).fill(anything),
    parameters: rule.parameters.map(() => anything),
    input: () => anything,
    t: [0, Number.POSITIVE_INFINITY],
  });
  return stateBounds(rule).map(({ low, high }, s) => {
    const [least, most] = next[s]!;
    // Where an operation has no bounds it may give no number, which bounds nothing.
    return [
      Math.max(low, Number.isNaN(least) ? low : least),
      Math.min(high, Number.isNaN(most) ? high : most),
    ];
  });
}
