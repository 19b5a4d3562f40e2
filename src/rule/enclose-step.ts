import type { Algebra } from "./graph/evaluate-over.js";
import { type Interval, minus, plus, times, wholeLine } from "./graph/interval.js";
import type { Operator } from "./graph/node.js";
import type { Rule } from "./rule.js";
import { intervalAlgebra, type StepArgumentsOver, stepOver } from "./step-over.js";

/** Enclosure of one step and its slope over an interval of the present value. */
export interface StepEnclosure {
  readonly value: Interval;
  readonly slope: Interval;
}

/** Parameters and inputs by slot; each input has one constant value. */
export interface FixedValues {
  readonly parameters: Float64Array;
  readonly inputs: Float64Array;
}

const exactly = (value: number): Interval => [value, value];

/** Operations with discontinuities. */
const jumpOperators: readonly Operator[] = ["floor", "ceil", "round", "sign", "mod", "choose"];

/** Interval arithmetic that reports when a discontinuity may lie inside: there the slope is unbounded. */
function jumpDetectingAlgebra(note: () => void): Algebra<Interval> {
  const withDetection = (operator: Operator): Algebra<Interval>["operations"][Operator] => {
    const plain = intervalAlgebra.operations[operator];
    const whole = operator === "floor" || operator === "ceil" || operator === "sign";
    return (a, b, c) => {
      const result = plain(a, b, c);
      const undecided = operator === "choose" ? a[0] !== a[1] : a[0] !== a[1] && !whole;
      if (undecided || (whole && result[1] - result[0] > 0.5)) note();
      return result;
    };
  };
  const operations = { ...intervalAlgebra.operations };
  for (const operator of jumpOperators) operations[operator] = withDetection(operator);
  return { ...intervalAlgebra, operations };
}

const intersection = (a: Interval, b: Interval): Interval => [Math.max(a[0], b[0]), Math.min(a[1], b[1])];

/**
 * For a rule of one state: a function that encloses the next value and its slope over an interval, lagged values
 * being equal to the present one. Every value of the step on the interval lies within `value`, and every slope within
 * `slope`, which is unbounded where the value may jump. The value is enclosed both directly and by the mean value
 * form, which is tighter on short intervals.
 */
export function encloseStep(rule: Rule, held: FixedValues): (present: Interval) => StepEnclosure {
  let jumps = false;
  const step = stepOver(
    rule,
    jumpDetectingAlgebra(() => {
      jumps = true;
    }),
  );
  const width = 1 + rule.lags.length;
  const parameters = Array.from(held.parameters, exactly);
  const inputs = Array.from(held.inputs, exactly);
  const placeOf = (present: Interval): StepArgumentsOver<Interval> => ({
    state: new Array<Interval>(width).fill(present),
    parameters,
    input: (slot) => inputs[slot]!,
    t: [Number.NaN, Number.NaN],
  });
  return (present) => {
    jumps = false;
    const place = placeOf(present);
    const value = step.next(place)[0]!;
    const slope = step.slopes(place)[0]!.reduce(plus);
    if (jumps) return { value, slope: wholeLine };
    const middle = present[0] + (present[1] - present[0]) / 2;
    const center = step.next(placeOf(exactly(middle)))[0]!;
    const centered = plus(center, times(slope, minus(present, exactly(middle))));
    const usable = Number.isFinite(centered[0]) && Number.isFinite(centered[1]) && !Number.isNaN(value[0]);
    return { value: usable ? intersection(value, centered) : value, slope };
  };
}
