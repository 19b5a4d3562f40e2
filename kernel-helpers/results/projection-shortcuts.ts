import type {
  Forecast as EngineForecast,
  Simulation as EngineSimulation,
  GroupForecast,
} from "../../src/projection/index.js";
import { attach, attachGroups } from "./attach.js";
import { unknownValueError } from "./errors.js";
import type { Fit } from "./fit-shortcuts.js";
import { namedValues } from "./named-values.js";

/** What was projected, by state; left out of listings and copies of the projection. */
export interface ProjectedValues {
  /** The path at the estimates, or at the given parameters, without random change, at the periods of `time`. */
  readonly values: Readonly<Record<string, readonly number[]>>;
  /** The last value of that path; NaN where it has left its range or can no longer be predicted. */
  readonly last: (state: string) => number;
}

/** One group or scenario carried forward, with its path by state. */
export interface ProjectedGroup extends GroupForecast, ProjectedValues {}

/** Shortcuts of a projection; `values` and `last` speak of its only group and scenario. */
interface Shortcuts extends ProjectedValues {
  readonly groups: readonly ProjectedGroup[];
  /** A group or scenario by its name; of several scenarios for several groups by both, as "flask A, rate 5%". */
  readonly group: (name: string) => ProjectedGroup;
}

/** A fit carried forward, with its uncertainties kept apart. */
export interface Forecast extends EngineForecast, Shortcuts {
  readonly fit: Fit;
  readonly groups: readonly ProjectedGroup[];
}

/** Paths of a rule at given parameters, with bands across them. */
export interface Simulation extends EngineSimulation, Shortcuts {
  readonly groups: readonly ProjectedGroup[];
}

/** Gives a forecast and its groups their shortcuts; its fit has its own. */
export function forecastWithValues(ahead: EngineForecast): Forecast {
  return withPaths(ahead) as Forecast;
}

/** Gives a simulation and its groups their shortcuts. */
export function simulationWithValues(run: EngineSimulation): Simulation {
  return withPaths(run) as Simulation;
}

function withPaths(ahead: EngineForecast | EngineSimulation): object {
  const { kind } = ahead;
  for (const group of ahead.groups) attach(group, pathsOf(kind, group));
  attachGroups(ahead, kind, ahead.groups as readonly ProjectedGroup[], ["values", "last"]);
  return ahead;
}

function pathsOf(what: string, { states }: GroupForecast): ProjectedValues {
  const paths = Object.fromEntries(states.map(({ state, central }) => [state, central]));
  const values = namedValues(paths, (name) => unknownValueError(what, name, Object.keys(paths)));
  return { values, last: (state) => values[state]!.at(-1) ?? Number.NaN };
}
