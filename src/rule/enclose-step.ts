import { type Interval, plus } from "./graph/interval.js";
import type { Rule } from "./rule.js";
import { intervalAlgebra, type PlaceOver, stepOver } from "./step-over.js";

/** Bounds on one step and its slope over a whole interval of the present value. */
export interface StepEnclosure {
  readonly value: Interval;
  readonly slope: Interval;
}

/** Constants and inputs by slot, inputs held at one value. */
export interface HeldValues {
  readonly constants: Float64Array;
  readonly inputs: Float64Array;
}

const exactly = (value: number): Interval => [value, value];

/**
 * For a rule of one state: a function that encloses the next value and its slope over an interval, past values
 * being the same as the present one. Every value that the step takes on the interval lies within `value`, and
 * every slope within `slope`.
 */
export function encloseStep(rule: Rule, held: HeldValues): (present: Interval) => StepEnclosure {
  const step = stepOver(rule, intervalAlgebra);
  const width = 1 + rule.memory.length;
  const constants = Array.from(held.constants, exactly);
  const inputs = Array.from(held.inputs, exactly);
  return (present) => {
    const state = new Array<Interval>(width).fill(present);
    const place: PlaceOver<Interval> = {
      state,
      constants,
      input: (slot) => inputs[slot]!,
      t: [Number.NaN, Number.NaN],
    };
    return { value: step.next(place)[0]!, slope: step.slopes(place)[0]!.reduce(plus) };
  };
}
