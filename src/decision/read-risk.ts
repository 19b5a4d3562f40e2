import { randomStream } from "../numeric/index.js";
import {
  blockStreams,
  drawnStarts,
  type Ground,
  noiseDraw,
  passageLog,
  runEnsemble,
  type Starts,
  stateLimits,
  unknownsDraw,
} from "../projection/index.js";
import type { Measure } from "./measure.js";
import { refuseMeasureName, refuseNoChance } from "./refusals.js";
import type { Setting } from "./set-value.js";
import type { Standing } from "./standing.js";

/** A probability with its Monte-Carlo error. */
export interface Risk {
  readonly value: number;
  readonly error: number;
}

/**
 * Reads a risk: the share of paths that ever get to the value ahead of the present. Every setting meets the same
 * random numbers, and for a fit the same drawn constants.
 *
 * @throws {ModelError} `unknown-name` | `nothing-random`.
 */
export function riskReader(
  standing: Standing,
  measure: Extract<Measure, { risk: string }>,
): (setting?: Setting, value?: number) => Risk {
  const { rule, change, paths, fit, present } = standing;
  const place = rule.states.indexOf(measure.risk);
  if (place < 0) throw refuseMeasureName(measure.risk, rule.states);
  if (fit === undefined && change.every((noise) => noise === undefined)) throw refuseNoChance(measure.risk);
  const source = fit && unknownsDraw(fit, standing.fitGround!.group);
  const seeds = blockStreams(randomStream(standing.seed), paths);
  return (setting, value) => {
    const ground = setting === undefined ? standing.ground : setting.at(value!);
    const streams = seeds.map((seed) => seed.jump());
    const drawn =
      fit === undefined
        ? sharedStarts(ground, paths)
        : drawnStarts(fit, standing.fitGround!, source!, paths, streams);
    const starts = setting === undefined ? drawn : withSetting(drawn, setting, ground);
    const log = passageLog(paths, measure.value, measure.direction);
    runEnsemble({
      compiled: ground.compiled,
      states: rule.states.length,
      width: ground.initial.length,
      inputs: ground.inputs,
      from: ground.from,
      periods: ground.periods,
      starts,
      change: change.map((noise) => noise && noiseDraw(noise)),
      reading: rule.states.map(() => undefined),
      limits: stateLimits(rule),
      streams,
      onRow: (t, values) => {
        if (t > present) log.add(t, values[place]!);
      },
    });
    const share = log.at.filter(Number.isFinite).length / paths;
    return { value: share, error: Math.sqrt((share * (1 - share)) / paths) };
  };
}

function sharedStarts(ground: Ground, paths: number): Starts {
  return { paths, size: ground.constants.length, constants: ground.constants, initial: ground.initial };
}

/** Drawn starts with a setting held: what is set is no longer drawn. */
function withSetting(starts: Starts, { role, slot }: Setting, ground: Ground): Starts {
  if (role === "constant") return { ...starts, constants: held(starts.constants, ground.constants, slot) };
  if (role === "initial") return { ...starts, initial: held(starts.initial, ground.initial, slot) };
  return starts;
}

function held(rows: Float64Array, set: Float64Array, slot: number): Float64Array {
  const copy = rows.slice();
  for (let at = slot; at < copy.length; at += set.length) copy[at] = set[slot]!;
  return copy;
}
