import { quantile } from "../numeric/index.js";

/**
 * A band across draws, period by period. `mean path` carries the uncertainty of the constants only; `future
 * observation` adds the errors of the process or of the reading. Neither is an interval for a constant.
 */
export interface Band {
  readonly kind: "mean path" | "future observation";
  readonly level: number;
  /** [periods], quantiles by definition 7. */
  readonly lower: readonly number[];
  readonly upper: readonly number[];
}

/**
 * Bands of each level from draws.
 *
 * @param draws - [paths, periods], row-major.
 */
export function bandsOf(
  kind: Band["kind"],
  draws: Float64Array,
  periods: number,
  levels: readonly number[],
): readonly Band[] {
  const paths = draws.length / periods;
  const lower = levels.map(() => new Array<number>(periods));
  const upper = levels.map(() => new Array<number>(periods));
  const column = new Float64Array(paths);
  for (let t = 0; t < periods; t++) {
    for (let path = 0; path < paths; path++) column[path] = draws[path * periods + t]!;
    column.sort();
    levels.forEach((level, l) => {
      lower[l]![t] = quantile(column, (1 - level) / 2);
      upper[l]![t] = quantile(column, (1 + level) / 2);
    });
  }
  return levels.map((level, l) => ({ kind, level, lower: lower[l]!, upper: upper[l]! }));
}
