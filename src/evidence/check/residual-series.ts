import type { GroupFit } from "../../estimate/index.js";

/** Residuals of one state by step index, from the first compared one on; NaN where none was compared. */
export function residualSeries(group: GroupFit, state: string): Float64Array {
  const own = group.points.filter((point) => point.state === state);
  const first = own[0]?.index ?? 0;
  const last = own[own.length - 1]?.index ?? -1;
  const series = new Float64Array(last - first + 1).fill(Number.NaN);
  for (const point of own) series[point.index - first] = point.residual;
  return series;
}
