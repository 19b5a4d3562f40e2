import { type Fit, type GroupFit, problemOf } from "../../estimate/index.js";
import { fUpperTail } from "../../numeric/index.js";

/** Whether a rule misses its readings by more than replicates differ among themselves. */
export interface LackOfFit {
  readonly state: string;
  /** Mean square of what the rule misses, over that within replicates. */
  readonly ratio: number;
  readonly degreesOfFreedom: readonly [number, number];
  readonly probability: number;
  readonly sentence: string;
}

/**
 * Holds the misfit of replicate means against the scatter within replicates, for each state whose readings were
 * averaged from replicates.
 *
 * F = [sum m_i r_i^2 / (n - p)] / [sum (m_i - 1) s_i^2 / sum (m_i - 1)], on the fitting scale: with proportional spread
 * s_i is taken relative to its mean.
 *
 * @see Draper, N. R. and Smith, H. (1998), Applied Regression Analysis, section 2.1.
 */
export function lackOfFit(fit: Fit, group: GroupFit): readonly LackOfFit[] {
  const { scale, errors, group: problemOfGroup } = problemOf(fit);
  const { recorded, kind } = problemOfGroup(group.group);
  if (errors !== "observation" || kind !== "least-squares" || recorded.replicates === undefined) return [];
  return fit.rule.states.flatMap((state) => {
    const spread = recorded.replicates?.[state];
    const points = group.points.filter((point) => point.state === state);
    const left = points.length - group.estimates.length;
    if (spread === undefined || left < 1) return [];
    const rows = points.map((point) => ({ ...point, place: recorded.index.indexOf(point.index) }));
    const missed = total(rows, ({ residual, place }) => spread.count[place]! * residual ** 2);
    const within = total(rows, ({ observed, place }) => {
      const deviation = spread.deviation[place]! / (scale.log ? observed : 1);
      return spread.count[place]! < 2 ? 0 : (spread.count[place]! - 1) * deviation ** 2;
    });
    const freedom = total(rows, ({ place }) => Math.max(0, spread.count[place]! - 1));
    if (!(within > 0)) return [];
    const ratio = missed / left / (within / freedom);
    const probability = fUpperTail(ratio, left, freedom);
    const sentence = told(ratio, probability);
    return [{ state, ratio, degreesOfFreedom: [left, freedom] as const, probability, sentence }];
  });
}

function total<T>(rows: readonly T[], of: (row: T) => number): number {
  return rows.reduce((sum, row) => sum + of(row), 0);
}

function told(ratio: number, probability: number): string {
  const numbers = `F ${ratio.toFixed(2)}, p ${probability < 0.001 ? "below 0.001" : probability.toFixed(3)}`;
  return probability < 0.05
    ? `The rule misses the readings by more than replicates differ among themselves (${numbers}).`
    : `The rule misses the readings by no more than replicates differ among themselves (${numbers}).`;
}
