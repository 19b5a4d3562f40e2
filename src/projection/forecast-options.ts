import type { InputPlans } from "../dynamics/index.js";
import type { Watch } from "./ensemble/placed-watches.js";
import type { Scenarios } from "./inputs/scenarios.js";

/** Options of `forecast`. */
export interface ForecastOptions {
  /** Whole periods beyond the last recorded one. */
  readonly periods: number;
  /** The recorded period to start after, by its label or number, or one a group; default the last one. */
  readonly from?: string | number | { readonly byGroup: Readonly<Record<string, string | number>> };
  /** By input, the first period ahead first; needed for every input that the record does not hold so far ahead. */
  readonly inputs?: InputPlans;
  /** Several plans of inputs side by side, run with the same random numbers. */
  readonly scenarios?: Scenarios;
  /** Levels of the bands; default 0.5, 0.8, 0.95. */
  readonly levels?: readonly number[];
  /** Drawn paths; default 4000. */
  readonly paths?: number;
  /** Seed of the draws; default 1. */
  readonly seed?: number;
  /** Values whose first passage is followed, for more paths than can be kept. */
  readonly watch?: readonly Watch[];
  /** Called now and then with what is done; what it throws ends the run. */
  readonly onProgress?: (done: number, of: number) => void;
}

/** The options that every forecast has settled. */
export type ForecastSettings = Required<Pick<ForecastOptions, "periods" | "levels" | "paths" | "seed">>;
