import { ModelError } from "../numeric/index.js";

export function refusePeriods(periods: number): ModelError {
  return new ModelError(
    "periods-not-whole",
    `A forecast runs over a whole number of periods, at least 1; ${periods} was given.`,
    { periods },
  );
}

export function refuseFutureInput(inputs: readonly string[], periods: number): ModelError {
  return new ModelError(
    "future-input-missing",
    `The rule needs ${inputs.join(", ")} for the next ${periods} periods; supply a scenario.`,
    { inputs, periods },
  );
}

export function refuseUndetermined(group: string): ModelError {
  return new ModelError(
    "constants-not-separated",
    `The constants${group === "" ? "" : ` of "${group}"`} cannot be separated by this record, so no margin can be put on a ` +
      "projection. Hold one with { fixed }, or use a rule with fewer constants.",
    { group },
  );
}

export function refuseNoPath(group: string, rule: string): ModelError {
  return new ModelError(
    "no-finite-path",
    `"${rule}" leaves the finite range at the fitted constants${group === "" ? "" : ` of "${group}"`}: nothing can be projected.`,
    { group, rule },
  );
}
