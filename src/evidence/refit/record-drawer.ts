import type { RandomStream } from "../../numeric/index.js";
import type { CompiledRule } from "../../rule/index.js";
import type { Comparisons } from "./comparisons-of.js";
import type { RefitProblem } from "./refitter.js";
import { runsOf } from "./runs-of.js";

/** Writes a record [rows, states] drawn from a rule; false where the draw left the range of numbers. */
export type RecordDrawer = (stream: RandomStream, out: Float64Array) => boolean;

/**
 * Draws records as the fitted rule says they come about: with the same periods, its own errors, and for errors in the
 * process the recorded first value.
 *
 * @param sigma - standard deviation of one error, on the fitting scale.
 */
export function recordDrawer(
  problem: RefitProblem,
  compiled: CompiledRule,
  compared: Comparisons,
  sigma: number,
): RecordDrawer {
  const { rule, options } = problem;
  const states = rule.states.length;
  const constants = Float64Array.from(rule.constants, (name) => problem.constants[name]!);
  const { runs, inputs, longest } = runsOf(problem, compared);
  const path = new Float64Array((longest + 1) * states);
  const initial = Float64Array.from(rule.states, (state) => problem.initial[state]!);
  const process = options.errors === "process";
  const log = options.spread === "proportional";
  return (stream, out) => {
    out.set(compared.values);
    for (const run of runs) {
      const start = process ? out.subarray(run.row * states, (run.row + 1) * states) : initial;
      compiled.path(start, constants, inputs, run.from, run.span, path);
      for (let i = run.first; i < run.end; i++) {
        const value = path[(compared.index[i]! - run.from) * states + compared.state[i]!]!;
        const error = sigma * stream.normal();
        const drawn = log ? value * Math.exp(error) : value + error;
        if (!Number.isFinite(drawn) || (log && drawn <= 0)) return false;
        out[compared.row[i]! * states + compared.state[i]!] = drawn;
      }
    }
    return true;
  };
}
