import type { RandomStream } from "../../src/numeric/index.js";
import { compileRule, type Rule } from "../../src/rule/index.js";

/** A record of a rule of one state with lognormal errors of the kind, drawn apart from the code that is tested. */
export function drawn(
  rule: Rule,
  parameters: readonly number[],
  initial: number,
  length: number,
  sd: number,
  errors: "process" | "observation",
  stream: RandomStream,
): Float64Array {
  const { step } = compileRule(rule);
  const state = Float64Array.of(initial);
  const given = Float64Array.from(parameters);
  const values = new Float64Array(length);
  for (let t = 0; t < length; t++) {
    if (t > 0) step(state, given, [], t - 1, state);
    const factor = Math.exp(sd * stream.normal());
    if (errors === "process" && t > 0) state[0] = state[0]! * factor;
    values[t] = errors === "process" ? state[0]! : state[0]! * factor;
  }
  return values;
}
