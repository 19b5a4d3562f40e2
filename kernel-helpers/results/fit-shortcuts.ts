import {
  type Fit as EngineFit,
  type GroupFit as EngineGroupFit,
  type Estimate,
  problemOf,
} from "../../src/estimate/index.js";
import type { ModelError } from "../../src/numeric/index.js";
import { attach, attachGroups } from "./attach.js";
import { noIntervalError, unknownValueError } from "./errors.js";
import { namedValues } from "./named-values.js";
import { type Observations, withLast } from "./record-shortcuts.js";

/** What was estimated, by name; left out of listings and copies of the fit. */
export interface EstimatedValues {
  /**
   * Estimates by name (`r`, `K`, and a first value as `values["N[0]"]`), those of parameters that the record does not
   * determine as well, and the values of held parameters.
   */
  readonly values: Readonly<Record<string, number>>;
  /**
   * Both limits of a parameter's interval at the fit's level: by profile, or Wald's where no profile was computed.
   * A limit that the record does not give is infinite.
   */
  readonly interval: (name: string) => readonly [lower: number, upper: number];
}

/** The fit of one group of a record, with its estimates by name. */
export interface GroupFit extends EngineGroupFit, EstimatedValues {}

/** A rule with its parameters estimated from a record; `values` and `interval` speak of its only group. */
export interface Fit extends EngineFit, EstimatedValues {
  readonly observations: Observations;
  /** Residual standard deviation of its only group, on the fitting scale; of groups fitted together the common one. */
  readonly sigma: number;
  readonly groups: readonly GroupFit[];
  /** A group of the record by its name. */
  readonly group: (name: string) => GroupFit;
}

/** Gives a fit and each of its groups the shortcuts to what was estimated. */
export function withEstimates(fit: EngineFit): Fit {
  withLast(fit.observations);
  for (const group of fit.groups) attach(group, ofGroup(fit, group));
  const groups = fit.groups as readonly GroupFit[];
  if (problemOf(fit).groups === "combined") attach(fit, ofAllGroups(fit));
  attachGroups(fit, "fit", groups, ["values", "interval", "sigma"]);
  return fit as Fit;
}

function ofGroup(fit: EngineFit, group: EngineGroupFit): EstimatedValues {
  const { rule } = fit;
  const reach = Math.max(0, ...rule.lags.map(({ lag }) => lag));
  const given = problemOf(fit).errors === "observation" ? rule.states : [];
  const held = {
    ...group.parameters,
    ...Object.fromEntries(given.map((state) => [`${state}[${reach}]`, group.initial[state]!])),
  };
  return byName(held, group.estimates, "");
}

/** What holds for all groups of a combined fit; each group's first values are its own. */
function ofAllGroups({ groups, population = [] }: EngineFit): Pick<Fit, "values" | "interval" | "sigma"> {
  const { group, parameters, sigma } = groups[0]!;
  return { ...byName(parameters, population, ` Values of one group: \`.group("${group}").values\`.`), sigma };
}

function byName(
  held: Readonly<Record<string, number>>,
  estimates: readonly Estimate[],
  more: string,
): EstimatedValues {
  const all = { ...held, ...Object.fromEntries(estimates.map(({ name, value }) => [name, value])) };
  const missing = (name: string): ModelError => unknownValueError("fit", name, Object.keys(all), more);
  return {
    values: namedValues(all, missing),
    interval: (name) => {
      const estimate = estimates.find((each) => each.name === name);
      if (estimate !== undefined) return limitsOf(estimate);
      throw name in all ? noIntervalError(name, all[name]!) : missing(name);
    },
  };
}

function limitsOf({ profile, wald, trace }: Estimate): readonly [number, number] {
  const { lower, upper } = trace.length > 0 ? profile : (wald ?? profile);
  return [lower ?? Number.NEGATIVE_INFINITY, upper ?? Number.POSITIVE_INFINITY];
}
