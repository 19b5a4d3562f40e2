import type { InputPlans } from "../dynamics/index.js";
import type { RunHooks } from "../numeric/index.js";
import type { Watch } from "./ensemble/placed-watches.js";
import type { Scenarios } from "./inputs/scenarios.js";

/** Options of `forecast`. */
export interface ForecastOptions extends RunHooks {
  /** Whole periods beyond the last recorded one. */
  readonly periods: number;
  /** The recorded period to start after, by its label or number, or one a group; default the last one. */
  readonly from?:
    | string
    | number
    | {
        /** One a group. */
        readonly byGroup: Readonly<Record<string, string | number>>;
      };
  /**
   * By input: what it will be, by the periods of the record, or one plan a group; needed for every input that
   * the record does not hold so far ahead.
   */
  readonly inputs?: InputPlans;
  /** Several plans of inputs side by side, by the name of the scenario, run with the same random numbers. */
  readonly scenarios?: Scenarios;
  /** Levels of the bands, each between 0 and 1; default [0.5, 0.8, 0.95]. */
  readonly levels?: readonly number[];
  /** Random paths; default 4000. */
  readonly paths?: number;
  /** Seed of the random numbers, a whole number; default that of the case, else 1. */
  readonly seed?: number;
  /** Levels whose first passage is followed, for runs with more paths than can be kept. */
  readonly watch?: readonly Watch[];
}

/** The options that every forecast has settled. */
export type ForecastSettings = Required<Pick<ForecastOptions, "periods" | "levels" | "paths" | "seed">>;
