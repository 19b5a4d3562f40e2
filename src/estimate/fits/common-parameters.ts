import { chiSquareUpperTail, fUpperTail, type Warning } from "../../numeric/index.js";
import { squaresObjective } from "../search/squares-objective.js";
import type { Prepared } from "../systems/prepared.js";
import type { Unknowns } from "../unknowns/unknowns.js";

/** Whether groups that were fitted with the same parameters have them in common. */
export interface CommonParameters {
  /** F of groups with parameters of their own against common ones; chi-square where the standard deviation is known. */
  readonly statistic: number;
  /** Parameters more, and values less all unknowns; infinite where the standard deviation is known. */
  readonly degreesOfFreedom: readonly [number, number];
  readonly probability: number;
}

/**
 * Fits every group by itself, from the common estimates, and holds the sums of squares against that of all together:
 * F = [(S0 - S1)/q]/[S1/(n - p)], all groups having one sigma.
 *
 * @param own - unknowns of a group by itself; `parts` and `starts` a group each.
 * @returns undefined where too few values are left for parameters of each group's own.
 * @see Bates, D. M. and Watts, D. G. (1988), Nonlinear Regression Analysis and Its Applications, section 3.10.
 */
export function commonParameters(
  own: readonly Unknowns[],
  parts: readonly Prepared[],
  starts: readonly Float64Array[],
  together: { readonly sumOfSquares: number; readonly free: number; readonly knownSd: boolean },
): CommonParameters | undefined {
  const count = parts.reduce((sum, { rows }) => sum + rows.count, 0);
  const free = own.reduce((sum, { names }) => sum + names.length, 0);
  const more = free - together.free;
  if (more < 1 || parts.some(({ rows }) => rows.count <= rows.size)) return undefined;
  const apart = parts.reduce((sum, { system, rows }, g) => {
    const { lower, upper } = own[g]!;
    return sum + squaresObjective(system, rows).minimise(starts[g]!, lower, upper).value;
  }, 0);
  const rise = Math.max(0, together.sumOfSquares - apart);
  if (together.knownSd)
    return {
      statistic: rise,
      degreesOfFreedom: [more, Number.POSITIVE_INFINITY],
      probability: chiSquareUpperTail(rise, more),
    };
  const left = count - free;
  const statistic = rise / more / (apart / left);
  return { statistic, degreesOfFreedom: [more, left], probability: fUpperTail(statistic, more, left) };
}

/** Probability below which a combined fit carries the caution. */
const doubtful = 0.05;

export function commonParametersWarnings(found: CommonParameters | undefined): Warning[] {
  if (found === undefined || !(found.probability < doubtful)) return [];
  return [
    {
      code: "groups-differ",
      message: `Evidence that the groups differ in their parameters (${testWords(found)}): the intervals of a combined fit are then too narrow. Write \`groups: "separate"\`, or \`groups: "mixed"\` for what varies among them.`,
    },
  ];
}

/** "F 5.21 on 2 and 30, p 0.011". */
export function testWords({
  statistic,
  degreesOfFreedom: [more, left],
  probability,
}: CommonParameters): string {
  const p = probability < 0.001 ? "p below 0.001" : `p ${probability.toFixed(3)}`;
  const on = Number.isFinite(left)
    ? `F ${statistic.toPrecision(3)} on ${more} and ${left}`
    : `chi-square ${statistic.toPrecision(3)} on ${more}`;
  return `${on}, ${p}`;
}
