import { Matrix, solve } from "ml-matrix";
import { type HeldStep, settled } from "../setting/held-step.js";

/** Slopes of the next present values by settled present values [states, states], and the gap to rest. */
export function linearisedGap(held: HeldStep, present: Float64Array): { gap: Float64Array; slopes: Matrix } {
  const { rule, width } = held;
  const states = rule.states.length;
  const { next, matrix } = held.slopes(settled(rule, present));
  const slopes = Matrix.zeros(states, states);
  for (let i = 0; i < states; i++) {
    for (let slot = 0; slot < width; slot++) {
      const column = slot < states ? slot : rule.states.indexOf(rule.lags[slot - states]!.state);
      slopes.set(i, column, slopes.get(i, column) + matrix[i * width + slot]!);
    }
    slopes.set(i, i, slopes.get(i, i) - 1);
  }
  return { gap: Float64Array.from(present, (value, i) => next[i]! - value), slopes };
}

const largest = (values: Float64Array): number =>
  values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);

/** One Newton step from a place, or undefined where the slopes allow none. */
function moved(held: HeldStep, present: Float64Array): Float64Array | undefined {
  const { gap, slopes } = linearisedGap(held, present);
  if (!gap.every(Number.isFinite) || !slopes.to1DArray().every(Number.isFinite)) return undefined;
  const move = solve(slopes, Matrix.columnVector(gap), true).to1DArray();
  const next = present.map((value, i) => value - move[i]!);
  return next.every(Number.isFinite) ? next : undefined;
}

/** Newton's method for values that the rule leaves as they are; undefined when it does not arrive. */
export function settleByNewton(held: HeldStep, start: Float64Array): Float64Array | undefined {
  let present = start;
  for (let k = 0; k < 60; k++) {
    const next = moved(held, present);
    if (next === undefined) return undefined;
    const step = largest(next.map((value, i) => value - present[i]!));
    present = next;
    if (step <= 4 * Number.EPSILON * largest(present)) break;
  }
  const { gap } = linearisedGap(held, present);
  return largest(gap) <= 1e-10 * Math.max(largest(present), 1e-300) || largest(gap) === 0
    ? present
    : undefined;
}
