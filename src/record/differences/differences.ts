import type { Warning } from "../../numeric/index.js";
import type { Observations } from "../observations.js";
import { notObservations, optionWrong } from "../refusals.js";
import { type DifferenceSeries, differenceSeries } from "./difference-series.js";
import { noPairs } from "./refusals.js";

/** Which differences to take. */
export interface DifferenceOptions {
  /** How many times differences are taken; a second difference needs three rows without a gap; default 1. */
  readonly order?: number;
  /** How many steps apart the two rows lie; with 1 a gap gives a multi-step pair; default 1. */
  readonly lag?: number;
  /** What `difference` holds: the change, the change per value, or that of logarithms; default "step". */
  readonly per?: "step" | "value" | "log";
  /** Steps in a season, 12 for months of a year: first takes the difference to the season before. */
  readonly seasonal?: number;
}

/** Differences of a record, pair by pair, with the multi-step pairs labelled. */
export interface Differences {
  readonly kind: "differences";
  readonly observations: Observations;
  readonly order: number;
  readonly lag: number;
  readonly per: "step" | "value" | "log";
  readonly seasonal: number | undefined;
  readonly series: readonly DifferenceSeries[];
  readonly warnings: readonly Warning[];
}

/**
 * Takes the differences of a record.
 *
 * With lag 1 and order 1 every row is paired with the one before it, and a pair across a gap keeps the number
 * of steps it spans. Any other difference is formed only where the rows it needs lie exactly that far apart.
 *
 * @returns change, ratio and per-head change of every pair, in the unit of the state (the ratio has none).
 * @throws {ModelError} `not-observations` | `option-wrong` | `no-pairs` | `no-logarithm` (naming the row, with per "log").
 * @example
 * const table = tableOf({ week: [1, 2, 4], eggs: [10, 12, 18] });
 * const counts = observations(table, { period: "week", step: { every: 1, of: "week" }, value: "eggs" });
 * const changes = differences(counts).series[0];
 * // changes.steps is [1, 2] and changes.change is [2, 6]
 */
export function differences(observations: Observations, options: DifferenceOptions = {}): Differences {
  if (observations?.kind !== "observations")
    throw notObservations(
      Array.isArray(observations) ? "an array" : `a value of type ${typeof observations}`,
    );
  const { order = 1, lag = 1, per = "step", seasonal } = options;
  positiveWhole("order", order);
  positiveWhole("lag", lag);
  if (seasonal !== undefined) positiveWhole("seasonal", seasonal);
  if (!["step", "value", "log"].includes(per)) throw optionWrong("per", per, '"step", "value" or "log"');
  if (per === "value" && (order > 1 || seasonal !== undefined))
    throw optionWrong("per", per, '"step" or "log" when order is above 1 or seasonal is given');
  const warnings: Warning[] = [];
  const plan = { order, lag, per, seasonal };
  const series = observations.groups.flatMap((group) =>
    observations.states.map((state) => differenceSeries(group, state, plan, warnings)),
  );
  if (series.every(({ index }) => index.length === 0)) throw noPairs(plan, observations.groups);
  return {
    kind: "differences",
    observations,
    ...plan,
    series,
    warnings,
  };
}

function positiveWhole(option: string, value: number): void {
  if (!Number.isInteger(value) || value < 1) throw optionWrong(option, value, "a whole number of at least 1");
}
