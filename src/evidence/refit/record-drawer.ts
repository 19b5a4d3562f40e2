import type { Fit } from "../../estimate/index.js";
import type { RandomStream } from "../../numeric/index.js";
import type { Refitter } from "./refitter.js";

/** Writes a record [rows, states] drawn from a fit; false where the draw left the range of numbers. */
export type RecordDrawer = (stream: RandomStream, out: Float64Array) => boolean;

/**
 * Draws records as a fit says they come about: with the same periods, its own errors, and for errors in the process
 * from the recorded first values on. Leaves the refitter holding the values drawn.
 *
 * @param sigma - standard deviation of one error of weight 1, on the fitting scale.
 */
export function recordDrawer(fit: Fit, { rows, recorded, at }: Refitter, sigma: number): RecordDrawer {
  const states = fit.rule.states.length;
  const steps = fit.options.errors === "process";
  const log = fit.options.distribution === "lognormal";
  const usable = log ? (value: number) => value > 0 && value < Infinity : Number.isFinite;
  const drawn = (i: number, stream: RandomStream): number => {
    rows.residualAt(i);
    const error = (sigma / rows.roots[i]!) * stream.normal();
    return log ? rows.fitted() * Math.exp(error) : rows.fitted() + error;
  };
  return (stream, out) => {
    out.set(recorded);
    rows.take(out);
    rows.prepare(at, false);
    for (let i = 0; i < rows.count; i++) {
      const value = drawn(i, stream);
      if (!usable(value)) return false;
      out[rows.entries[i]! * states + rows.states[i]!] = value;
      // Steps go on from what was drawn.
      if (steps) rows.take(out);
    }
    if (!steps) rows.take(out);
    return true;
  };
}
