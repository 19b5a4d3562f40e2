import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitPoint } from "./fit-points.js";

/** What a fit used of a group's record. */
export interface FitUse {
  /** Rows of the group, and values recorded in them. */
  readonly rows: number;
  readonly recorded: number;
  /** Values compared with the rule; of them, those known only to a limit. */
  readonly compared: number;
  readonly censored: number;
  /** What a value weighs by: the record's own weights, the number of technical replicates averaged, or all alike. */
  readonly weighedBy: "weights" | "replicates" | "alike";
  /** Smallest and largest weight. */
  readonly weights: readonly [number, number];
}

/** Counts what was compared, and how it weighed. */
export function fitUse(rule: Rule, group: ObservedGroup, points: readonly FitPoint[]): FitUse {
  const values = rule.states.map((state) => group.values[state]!);
  const recorded = values.reduce((sum, column) => sum + column.filter(Number.isFinite).length, 0);
  const counts = rule.states.flatMap((state) => Array.from(group.replicates?.[state]?.count ?? []));
  const weights = Array.from(group.weights ?? counts);
  const range: FitUse["weights"] = weights.length > 0 ? [Math.min(...weights), Math.max(...weights)] : [1, 1];
  const uneven = range[1] > 1 || range[0] < 1;
  return {
    rows: group.index.length,
    recorded,
    compared: points.length,
    censored: points.filter(({ censoring }) => censoring !== 0).length,
    weighedBy: uneven ? (group.weights ? "weights" : "replicates") : "alike",
    weights: range,
  };
}

/** What a reader must know of the rows that a fit used, a sentence each. */
export function useSentences(
  uses: readonly FitUse[],
  fit: { readonly steps: boolean; readonly counts: boolean },
): string[] {
  const sum = (of: (use: FitUse) => number): number => uses.reduce((total, use) => total + of(use), 0);
  const [recorded, compared, censored] = [
    sum((use) => use.recorded),
    sum((use) => use.compared),
    sum((use) => use.censored),
  ];
  const where = uses.length > 1 ? " of each group" : "";
  return [
    ...(fit.steps && compared < recorded
      ? [`${compared} of ${recorded} values compared: the first${where} are where the steps begin.`]
      : []),
    ...(censored > 0 ? [`${censored} of ${compared} values are known only to a limit (censored).`] : []),
    ...weightSentence(uses, fit.counts),
  ];
}

function weightSentence(uses: readonly FitUse[], counts: boolean): string[] {
  const weighed = uses.find(({ weighedBy }) => weighedBy !== "alike");
  if (weighed === undefined) return [];
  const low = Math.min(...uses.map(({ weights }) => weights[0]));
  const high = Math.max(...uses.map(({ weights }) => weights[1]));
  const how = counts ? "multiplies the log-likelihood of a row" : "divides the variance of a value";
  const what =
    weighed.weighedBy === "replicates"
      ? "Means of technical replicates weigh by their number"
      : "Rows weigh by the record's weights";
  return [`${what}, ${low} to ${high}: a weight ${how}.`];
}
