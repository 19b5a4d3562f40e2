import type { FitRows } from "./fit-rows.js";

/** The compared values of several groups as one, over unknowns that they share in part. */
export interface CombinedRows extends FitRows {
  /** [groups]: number of the first value of each group, with the total at the end. */
  readonly firsts: Int32Array;
}

/**
 * Puts the rows of several groups behind one another.
 *
 * @param maps - by group: for each of its own unknowns its number among the unknowns of all.
 */
export function combinedRows(
  groups: readonly FitRows[],
  maps: readonly Int32Array[],
  size: number,
): CombinedRows {
  const firsts = new Int32Array(groups.length + 1);
  groups.forEach((rows, g) => {
    firsts[g + 1] = firsts[g]! + rows.count;
  });
  const locals = maps.map((map) => new Float64Array(map.length));
  const owner = Int32Array.from(groups.flatMap((rows, g) => new Array<number>(rows.count).fill(g)));
  const row = new Float64Array(size);
  const joined = (pick: (rows: FitRows) => ArrayLike<number>): number[] =>
    groups.flatMap((rows) => Array.from(pick(rows)));
  const roots = Float64Array.from(joined((rows) => rows.roots));
  const reweigh = (at: Float64Array): boolean => {
    const changed = groups.map((rows, g) => rows.reweigh?.(gather(at, maps[g]!, locals[g]!)) ?? false);
    roots.set(joined((rows) => rows.roots));
    return changed.includes(true);
  };
  let withRows = false;
  let last = 0;
  return {
    size,
    count: owner.length,
    row,
    firsts,
    entries: Int32Array.from(joined((rows) => rows.entries)),
    states: Int32Array.from(joined((rows) => rows.states)),
    observed: Float64Array.from(joined((rows) => rows.observed)),
    roots,
    ...(groups.some((rows) => rows.reweigh) && { reweigh }),
    prepare(at, needRows) {
      withRows = needRows;
      groups.forEach((rows, g) => {
        gather(at, maps[g]!, locals[g]!);
        rows.prepare(locals[g]!, needRows);
      });
    },
    residualAt(i) {
      last = owner[i]!;
      const rows = groups[last]!;
      const residual = rows.residualAt(i - firsts[last]!);
      if (withRows) {
        row.fill(0);
        maps[last]!.forEach((place, k) => {
          row[place] = rows.row[k]!;
        });
      }
      return residual;
    },
    fitted: () => groups[last]!.fitted(),
    // Groups are put in the record's place one by one, through their own rows.
    take: () => undefined,
  };
}

/** The unknowns of one group among those of all. */
export function gather(all: Float64Array, map: Int32Array, own: Float64Array): Float64Array {
  for (let k = 0; k < map.length; k++) own[k] = all[map[k]!]!;
  return own;
}
