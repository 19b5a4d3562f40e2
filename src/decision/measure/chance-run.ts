import { randomStream } from "../../numeric/index.js";
import {
  blockStreams,
  drawnStarts,
  type EnsembleRun,
  type Ground,
  noiseDraw,
  runEnsemble,
  type Starts,
  stateLimits,
  unknownsDraw,
} from "../../projection/index.js";
import type { Setting } from "../setting/set-value.js";
import type { Standing } from "../setting/standing.js";

/** Starts with what a fit leaves open of its sigma. */
type RunStarts = Starts & Pick<EnsembleRun, "spread">;

/** What listens to a run. */
export type Listener = Pick<EnsembleRun, "onRow" | "onStep">;

/** Runs all paths at a setting of its own, or as things stand. */
export type ChanceRun = (listener: Listener, setting?: Setting, value?: number) => void;

/** Whether chance has a part: random change of a rule, or a fit, whose parameters are uncertain. */
export function hasChance({ fit, change }: Standing): boolean {
  return fit !== undefined || change.some((noise) => noise !== undefined);
}

/** Runs that all meet the same random numbers, and for a fit the same drawn parameters. */
export function chanceRun(standing: Standing): ChanceRun {
  const { rule, change, paths, fit } = standing;
  const source = fit && unknownsDraw(fit, standing.fitGround!.group);
  const seeds = blockStreams(randomStream(standing.seed), paths);
  return (listener, setting, value) => {
    standing.tick();
    const ground = setting === undefined ? standing.ground : setting.at(value!);
    const streams = seeds.map((seed) => seed.jump());
    const drawn: RunStarts =
      fit === undefined
        ? sharedStarts(ground, paths)
        : drawnStarts(fit, standing.fitGround!, source!, paths, streams);
    runEnsemble({
      compiled: ground.compiled,
      states: rule.states.length,
      width: ground.initial.length,
      inputs: ground.inputs,
      from: ground.from,
      periods: ground.periods,
      starts: setting === undefined ? drawn : withSetting(drawn, setting, ground),
      change: change.map((noise) => noise && noiseDraw(noise)),
      reading: rule.states.map(() => undefined),
      spread: drawn.spread,
      limits: stateLimits(rule),
      streams,
      ...listener,
    });
  };
}

function sharedStarts(ground: Ground, paths: number): RunStarts {
  return {
    spread: undefined,
    paths,
    size: ground.parameters.length,
    parameters: ground.parameters,
    initial: ground.initial,
  };
}

/** Drawn starts with a setting held: what is set is no longer drawn. */
function withSetting(starts: Starts, { role, slot }: Setting, ground: Ground): Starts {
  if (role === "parameter")
    return { ...starts, parameters: held(starts.parameters, ground.parameters, slot) };
  if (role === "initial") return { ...starts, initial: held(starts.initial, ground.initial, slot) };
  return starts;
}

function held(rows: Float64Array, set: Float64Array, slot: number): Float64Array {
  const copy = rows.slice();
  for (let at = slot; at < copy.length; at += set.length) copy[at] = set[slot]!;
  return copy;
}
