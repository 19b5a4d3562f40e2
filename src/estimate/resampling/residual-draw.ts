import type { RandomStream } from "../../numeric/index.js";
import { noResidualsError } from "../errors.js";
import type { RecordDraw, Refitter } from "../problem/refitter.js";

/** How errors of simulated records are drawn. */
export type ResampledErrors = "parametric" | "residual" | "block";

/**
 * Draws records from the fit's own residuals, widened by sqrt(n / (n - p)) and drawn with replacement: one by one, or in
 * runs of neighbours, which keep their dependence.
 *
 * @param block - length of a run; default the cube root of the number of values, rounded up.
 */
export function residualDraw(
  again: Refitter,
  errors: ResampledErrors,
  block: number | undefined,
): RecordDraw {
  const { rows, at, disturb } = again;
  if (disturb === undefined) throw noResidualsError();
  const { count, size, roots } = rows;
  rows.prepare(at, false);
  const residuals = Float64Array.from({ length: count }, (_, i) => rows.residualAt(i));
  const widened = Math.sqrt(count / (count - size));
  const run = errors === "block" ? (block ?? Math.ceil(Math.cbrt(count))) : 1;
  const length = Math.min(Math.max(1, Math.round(run)), count);
  const drawn = (stream: RandomStream): Float64Array => {
    const found = new Float64Array(count);
    for (let i = 0; i < count; i += length) {
      const first = Math.floor(stream.uniform() * (count - length + 1));
      for (let k = 0; k < length && i + k < count; k++)
        found[i + k] = (widened * residuals[first + k]!) / roots[i + k]!;
    }
    return found;
  };
  return (stream) => disturb(drawn(stream));
}
