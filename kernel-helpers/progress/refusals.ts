import { ModelError } from "../../src/numeric/index.js";

/** The analyst stopped the work; what was done is lost, because half of it would be read as the whole. */
export function refuseInterrupted(record: string): ModelError {
  return new ModelError(
    "interrupted",
    `${record} The work was interrupted and its result is not kept; run it again for one.`,
    { record },
  );
}
