import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import { noStartError, tooFewError } from "../errors.js";
import type { FitOptions } from "../options/fit-options.js";
import { criteria } from "../result/criteria.js";
import { describeFit } from "../result/describe-fit.js";
import { estimatesOf } from "../result/estimate-of.js";
import { combinedRows, gather } from "../rows/combined-rows.js";
import { cutOf } from "../search/cut.js";
import { type Optimum, optimum } from "../search/optimum.js";
import { squaresObjective } from "../search/squares-objective.js";
import { startingPoints } from "../search/starting-points.js";
import { normalEquations } from "../systems/normal-equations.js";
import { prepared } from "../systems/prepared.js";
import { sharedUnknowns } from "../unknowns/shared-unknowns.js";
import { unknownsOf } from "../unknowns/unknowns.js";
import { commonParameters } from "./common-parameters.js";
import type { JointFit } from "./joint-fit.js";

/**
 * Fits the same parameters to all groups by least squares, with an initial state for every group and one sigma. In each
 * group's part the errors are those of the common fit; `sumOfSquares` and `count` are the group's own.
 */
export function combinedFit(rule: Rule, groups: readonly ObservedGroup[], options: FitOptions): JointFit {
  const own = groups.map(() => unknownsOf(rule, options));
  const parts = groups.map((group, g) => prepared(rule, group, own[g]!, options));
  const { all, maps } = sharedUnknowns(groups, own);
  const rows = combinedRows(
    parts.map((part) => part.rows),
    maps,
    all.names.length,
  );
  if (rows.count < rows.size + 3) throw tooFewError(groups[0]!, rows.count, all.names, "values");
  const starts = groups.map((group, g) => startingPoints(rule, group, options, own[g]!, parts[g]!));
  const usable = starts.filter((points) => points.length > 0);
  if (usable.length < groups.length) throw noStartError(groups[0]!, rule.text);
  const begun = usable.map((points) => joinedStart(points[0]!, starts, maps, rows.size));
  const cutAt = (sum: number): ReturnType<typeof cutOf> => cutOf(sum, rows.count, rows.size, options);
  const objective = squaresObjective(normalEquations(rows), rows);
  const found = optimum(objective, all, begun, cutAt, options.intervals !== "none");
  const level = options.level ?? 0.95;
  const left = rows.count - rows.size;
  const estimates = estimatesOf(rule, all, found, level, left);
  const common = commonParameters(
    own,
    parts,
    maps.map((map) => gather(found.at, map, new Float64Array(map.length))),
    { sumOfSquares: found.value, free: rows.size, knownSd: options.sd !== undefined },
  );
  const together = { values: rows.count, unknowns: rows.size };
  const measures = { sigma: Math.sqrt(found.value / left), exact: true, together };
  return {
    criteria: criteria(found.value, rows, options),
    ...(common && { commonParameters: common }),
    population: estimates.filter(({ role }) => role === "parameter"),
    groups: groups.map((group, g) => {
      const searched = { group, unknowns: own[g]!, rows: parts[g]!.rows };
      return describeFit(rule, searched, options, partOf(found, maps[g]!, rows.size), measures);
    }),
  };
}

/** The parameters of one group's start with every group's own initial states. */
function joinedStart(
  parameters: Float64Array,
  starts: readonly (readonly Float64Array[])[],
  maps: readonly Int32Array[],
  size: number,
): Float64Array {
  const whole = new Float64Array(size);
  maps.forEach((map, g) => {
    map.forEach((place, k) => {
      whole[place] = starts[g]![0]![k]!;
    });
  });
  maps[0]!.forEach((place, k) => {
    if (maps.every((map) => map[k] === place)) whole[place] = parameters[k]!;
  });
  return whole;
}

/** What the optimum of all groups says of one group's unknowns. */
function partOf(found: Optimum, map: Int32Array, size: number): Optimum {
  const pick = <T>(values: readonly T[]): T[] => Array.from(map, (place) => values[place]!);
  const own = map.length;
  return {
    ...found,
    at: gather(found.at, map, new Float64Array(own)),
    profiles: found.profiles && pick(found.profiles),
    covariance: Float64Array.from(
      { length: own * own },
      (_, k) => found.covariance[map[Math.floor(k / own)]! * size + map[k % own]!]!,
    ),
    determined: pick(found.determined),
    separable: pick(found.separable),
    unbounded: Int8Array.from(map, (place) => found.unbounded[place]!),
    rivals: found.rivals.map((rival) => ({
      ...rival,
      estimates: gather(rival.estimates, map, new Float64Array(own)),
    })),
  };
}
