import { type Fit, type GroupFit, problemOf, type Refitter } from "../../estimate/index.js";
import { labelAt } from "../../record/index.js";

/** The estimates from part of the record. */
export interface Window {
  readonly name: string;
  /** First and last time used, in the period column's unit, and their periods in words. */
  readonly from: number;
  readonly to: number;
  readonly periods: readonly [string, string];
  readonly count: number;
  readonly estimates: readonly {
    readonly name: string;
    readonly value: number;
    /** Away from the estimate of the whole record, in its standard errors; undefined where it has none. */
    readonly shift: number | undefined;
  }[];
}

/** Shares of the record left out, at its beginning and its end. */
const shares = [0.2, 0.4];

/**
 * Refits to parts of the record: without its first row, without its last, without the first and last fifth and two
 * fifths. A part with fewer values than unknowns + 3 is passed over.
 */
export function windows(fit: Fit, group: GroupFit): readonly Window[] {
  const { refitter, recorded, beginning } = problemOf(fit).group(group.group);
  const steps = !beginning().fromStart;
  const again = refitter();
  if (again?.minimisePart === undefined) return [];
  const { time, axis, index } = recorded;
  const last = time.length - 1;
  const cut = (share: number): number => Math.round(share * time.length);
  const parts: readonly (readonly [string, number, number])[] = [
    ["without the first row", 1, last],
    ["without the last row", 0, last - 1],
    ...shares.map((share) => [`without the first ${100 * share}%`, cut(share), last] as const),
    ...shares.map((share) => [`without the last ${100 * share}%`, 0, last - cut(share)] as const),
  ];
  const label = (row: number): string => labelAt(axis, index[row]!);
  const seen = new Set<string>();
  return parts.flatMap(([name, from, to]) => {
    if (seen.has(`${from} ${to}`)) return [];
    seen.add(`${from} ${to}`);
    const [first, end] = comparedIn(again, from, to, steps);
    if (end - first < again.at.length + 3) return [];
    const found = again.minimisePart!(again.at, first, end);
    if (found.stop.kind === "failed") return [];
    const estimates = group.estimates.map((estimate, i) => {
      const value = again.reported(i, found.estimates[i]!);
      const { standardError } = estimate;
      const shift = standardError === undefined ? undefined : (value - estimate.value) / standardError;
      return { name: estimate.name, value, shift };
    });
    return [
      {
        name,
        from: time[from]!,
        to: time[to]!,
        periods: [label(from), label(to)],
        count: end - first,
        estimates,
      },
    ];
  });
}

/** Compared values of rows `from` to `to`, and of steps within them: the first, and one beyond the last. */
function comparedIn({ rows }: Refitter, from: number, to: number, steps: boolean): [number, number] {
  const inside = (row: number): boolean => row >= (steps ? from + 1 : from) && row <= to;
  const first = rows.entries.findIndex(inside);
  let end = Math.max(first, 0);
  while (end < rows.count && inside(rows.entries[end]!)) end++;
  return [Math.max(first, 0), end];
}
