import { normalQuantile, type RandomStream } from "../../numeric/index.js";
import type { ComparedValue, ErrorFamily } from "./error-family.js";
import type { Search } from "./search.js";

/**
 * `raw`: observed minus fitted, on the fitting scale. `pearson`: in standard deviations of the error distribution; NaN for
 * a censored value. `quantile`: the standard normal value of the same probability, drawn within the step of a count or
 * within what is known of a censored value, so that the residuals of a right fit are normal whatever the distribution.
 */
export type ResidualKind = "raw" | "pearson" | "quantile";

/**
 * The residuals of a fit at its estimates, [values compared].
 *
 * @param standardised - errors of a filter's predictions over their standard deviations.
 * @param stream - of randomised quantile residuals.
 * @see Dunn, P. K. and Smyth, G. K. (1996), Randomized quantile residuals, Journal of Computational and Graphical
 *   Statistics 5:236.
 */
export function residualsOf(
  search: Search,
  censoring: Int8Array,
  at: Float64Array,
  sigma: number,
  kind: ResidualKind,
  stream: RandomStream,
): Float64Array {
  const { rows, family, standardised } = search;
  if (kind !== "raw" && standardised !== undefined) return standardised(at);
  rows.prepare(at, false);
  const spread = search.spreadAt(at, sigma);
  return Float64Array.from({ length: rows.count }, (_, i) => {
    const residual = rows.residualAt(i) / rows.roots[i]!;
    if (kind === "raw" || family === undefined) return residual;
    const value: ComparedValue = {
      observed: rows.observed[i]!,
      fitted: rows.fitted(),
      censoring: censoring[i]!,
      root: rows.roots[i]!,
    };
    return kind === "pearson"
      ? pearsonResidual(family, value, spread)
      : quantileResidual(family, value, spread, stream);
  });
}

/** Not known of a censored value. */
function pearsonResidual(family: ErrorFamily, value: ComparedValue, spread: number): number {
  return value.censoring === 0 ? family.pearson(value, spread) : Number.NaN;
}

function quantileResidual(
  family: ErrorFamily,
  value: ComparedValue,
  spread: number,
  stream: RandomStream,
): number {
  const [below, upTo] = family.cumulative(value, spread);
  const low = value.censoring < 0 ? 0 : below;
  const high = value.censoring > 0 ? 1 : upTo;
  const share = low === high ? low : low + stream.uniform() * (high - low);
  // Probabilities that round to 0 or 1 stand for the farthest value that a double tells.
  return normalQuantile(Math.min(Math.max(share, 1e-300), 1 - 2 ** -53));
}
