import type { Fit, GroupFit } from "../../estimate/index.js";
import type { Noise } from "./noise.js";

/** By state: what a fit says about the scatter of single periods and of single readings. */
export interface FittedNoise {
  readonly change: readonly (Noise | undefined)[];
  readonly reading: readonly (Noise | undefined)[];
}

/** The noise that a fit has found, on the side that it blames. */
export function fittedNoise(fit: Fit, group: GroupFit): FittedNoise {
  const { states } = fit.rule;
  const { filter } = group;
  if (filter !== undefined)
    return {
      change: states.map((state) => scatter(fit, group, filter.processError[state]!)),
      reading: states.map((state) => scatter(fit, group, filter.observationError[state]!)),
    };
  const none = states.map(() => undefined);
  const all = states.map(() => scatter(fit, group, group.sigma));
  return fit.options.errors === "observation"
    ? { change: none, reading: all }
    : { change: all, reading: none };
}

function scatter(fit: Fit, group: GroupFit, sd: number): Noise {
  const { distribution = "normal" } = fit.options;
  if (distribution === "poisson") return { distribution };
  if (distribution === "negative-binomial") {
    const dispersion = group.estimates.find((estimate) => estimate.name === "dispersion")!.value;
    return { distribution, size: 1 / dispersion };
  }
  return { distribution, sd: group.filter === undefined ? (fit.options.sd ?? sd) : sd };
}
