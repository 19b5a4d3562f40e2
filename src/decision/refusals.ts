import { ModelError } from "../numeric/index.js";

export function refuseStateUnknown(state: string, states: readonly string[]): ModelError {
  return new ModelError(
    "unknown-state",
    `The forecast has no state "${state}". It has: ${states.join(", ")}.`,
    { state, states },
  );
}

export function refuseTarget(value: number): ModelError {
  return new ModelError(
    "target-not-finite",
    `The value to reach must be a finite number; ${value} was given.`,
    { value },
  );
}
