import type { EnsembleRun } from "./ensemble.js";
import type { Scatter } from "./scatter.js";
import type { Settler } from "./settle.js";

/** What would be observed of the states of all paths. */
export interface ReadingColumns {
  /** [states][paths]; those of the states themselves where nothing stands between. */
  readonly columns: readonly Float64Array[];
  /** Fills in a block of paths from their states. */
  readonly report: (first: number, last: number, block: number) => void;
}

/**
 * Observations: factor times state, with its error. Of a state within its bounds the observation lies within them too;
 * of one that stays at a bound it is the bound.
 */
export function readingColumns(
  run: Pick<EnsembleRun, "bounds" | "observable" | "reading" | "factors">,
  scatter: Scatter,
  settler: Settler,
  values: readonly Float64Array[],
): ReadingColumns {
  const { bounds, observable, reading, factors } = run;
  const apart = bounds.map((_, s) => reading[s] !== undefined || factors?.[s] !== undefined);
  const columns = values.map((column, s) => (apart[s] ? new Float64Array(column.length) : column));
  const ranges = bounds.map(({ low, high }, s): readonly [number, number] => {
    const [least, most] = observable?.[s] ?? [low, high];
    return [Math.max(least, reading[s]?.least ?? Number.NEGATIVE_INFINITY), most];
  });
  const reportOf = (s: number, first: number, last: number, block: number): void => {
    const [column, state, draw] = [columns[s]!, values[s]!, reading[s]];
    const factor = factorOf(factors?.[s]);
    for (let path = first; path < last; path++) column[path] = factor(path) * state[path]!;
    if (draw === undefined) return;
    scatter(draw, column, first, 1, last - first, block);
    for (let path = first; path < last; path++) {
      const own = settler.isAbsorbed(path, s) ? state[path]! : undefined;
      column[path] = factor(path) * (own ?? within(ranges[s]!, state[path]!, column[path]! / factor(path)));
    }
  };
  return {
    columns,
    report(first, last, block) {
      for (let s = 0; s < columns.length; s++) if (apart[s]) reportOf(s, first, last, block);
    },
  };
}

const factorOf =
  (factors: Float64Array | undefined) =>
  (path: number): number =>
    factors?.[factors.length === 1 ? 0 : path] ?? 1;

/** An observation held within a range, unless the state itself lies outside it. */
function within([least, most]: readonly [number, number], state: number, observed: number): number {
  if (state >= least && observed < least) return least;
  return state <= most && observed > most ? most : observed;
}
