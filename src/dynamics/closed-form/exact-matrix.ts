import { isLinearInStates, type Rule, stepOver } from "../../rule/index.js";
import { fromDecimal, type Rational, rational } from "../exact/rational.js";
import { rationalAlgebra } from "../exact/rational-algebra.js";
import type { HeldStep } from "../setting/held-step.js";

/** A step x' = A x + b in exact fractions: A [width][width], b [width]. */
export interface LinearStep {
  readonly matrix: readonly (readonly Rational[])[];
  readonly added: readonly Rational[];
  /** False where a coefficient has no exact fraction and its computer number was taken instead. */
  readonly exact: boolean;
}

/** A computer number as the binary fraction that it is. */
function fromBinary(value: number): Rational {
  let scaled = value;
  let denominator = 1n;
  while (!Number.isInteger(scaled)) {
    scaled *= 2;
    denominator *= 2n;
  }
  return rational(BigInt(scaled), denominator);
}

function inNumbers(held: HeldStep): LinearStep {
  const origin = new Float64Array(held.width);
  const { next, matrix } = held.slopes(origin);
  const row = (i: number): Rational[] =>
    Array.from(matrix.subarray(i * held.width, (i + 1) * held.width), fromBinary);
  return {
    matrix: Array.from({ length: held.width }, (_, i) => row(i)),
    added: Array.from(next, fromBinary),
    exact: false,
  };
}

function inFractions(held: HeldStep): LinearStep {
  const { rule, width } = held;
  const step = stepOver(rule, rationalAlgebra);
  const inputs = Array.from(held.inputs, fromDecimal);
  const place = {
    state: new Array<Rational>(width).fill(rational(0n)),
    parameters: Array.from(held.parameters, fromDecimal),
    input: (slot: number): Rational => inputs[slot]!,
    t: rational(0n),
  };
  return { matrix: step.slopes(place), added: step.next(place), exact: true };
}

/** The rule as a linear step, or undefined when it is none. */
export function linearStep(rule: Rule, held: HeldStep): LinearStep | undefined {
  if (!isLinearInStates(rule)) return undefined;
  try {
    return inFractions(held);
  } catch (refusal) {
    if ((refusal as { code?: unknown }).code === "no-rational-value") return inNumbers(held);
    throw refusal;
  }
}
