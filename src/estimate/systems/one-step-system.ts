import type { LinearisedSystem } from "../../numeric/index.js";
import type { StepSums } from "../../rule/index.js";
import { place, type Unknowns } from "../unknowns/unknowns.js";
import { packedSums } from "./packed-sums.js";

/** Pairs one step apart, laid out for the generated sums. */
export interface RecordedSteps {
  readonly inputs: readonly Float64Array[];
  /** [pairs]: period from which each step is taken. */
  readonly periods: Int32Array;
  /** [pairs, slots]: state vector where the step begins; what is observed after it on the fitting scale; root weights. */
  readonly from: Float64Array;
  readonly observed: Float64Array;
  readonly weights: Float64Array;
}

/** The least-squares system of a one-step fit without gaps, its sums gathered in one pass by `stepSums`. */
export function oneStepSystem(
  stepSums: StepSums,
  unknowns: Unknowns,
  { inputs, periods, from, observed, weights }: RecordedSteps,
): LinearisedSystem {
  const { columns, parameters } = unknowns;
  const { sums, triangle, projected, factor } = packedSums(columns, parameters.length);
  return {
    size: columns.length,
    triangle,
    projected,
    evaluate(at) {
      place(unknowns, at);
      return stepSums(parameters, inputs, periods, from, observed, weights, sums);
    },
    linearise: factor,
  };
}
