import { passageLog } from "../../projection/index.js";
import { refuseMeasureName, refuseNoChance } from "../refusals.js";
import type { Setting } from "../setting/set-value.js";
import type { Standing } from "../setting/standing.js";
import { chanceRun, hasChance } from "./chance-run.js";
import type { Measure } from "./measure.js";

/** A number with its Monte-Carlo error. */
export interface Estimated {
  readonly value: number;
  readonly error: number;
}

/** Reads a number at a setting of its own, or as things stand. */
export type EstimatedReader = (setting?: Setting, value?: number) => Estimated;

/**
 * Reads a probability: the share of paths that ever get to the value ahead of the present. Every setting meets the same
 * random numbers, and for a fit the same drawn parameters.
 *
 * @throws {ModelError} `unknown-name` | `nothing-random`.
 */
export function probabilityReader(
  standing: Standing,
  measure: Extract<Measure, { probability: string }>,
): EstimatedReader {
  const { rule, paths, present } = standing;
  const place = rule.states.indexOf(measure.probability);
  if (place < 0) throw refuseMeasureName(measure.probability, rule.states);
  if (!hasChance(standing)) throw refuseNoChance(measure.probability);
  const run = chanceRun(standing);
  return (setting, value) => {
    const log = passageLog(paths, measure);
    const onRow = (t: number, values: readonly Float64Array[]): void => {
      if (t > present) log.add(t, values[place]!);
    };
    run({ onRow }, setting, value);
    const share = log.at.filter(Number.isFinite).length / paths;
    return { value: share, error: Math.sqrt((share * (1 - share)) / paths) };
  };
}
