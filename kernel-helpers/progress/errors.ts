import { ModelError } from "../../src/numeric/index.js";

/** The partial result is discarded, because it could be taken for the whole. */
export function interruptedError(record: string): ModelError {
  return new ModelError(
    "interrupted",
    `${record} The calculation was interrupted and has no result. Run it again.`,
    { record },
  );
}
