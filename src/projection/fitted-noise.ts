import type { Fit, GroupFit } from "../estimate/index.js";
import type { Noise } from "./noise.js";

/** By state: what a fit says about the scatter of single periods and of single readings. */
export interface FittedNoise {
  readonly change: readonly (Noise | undefined)[];
  readonly reading: readonly (Noise | undefined)[];
}

/** The noise that a fit has found, on the side that it blames. */
export function fittedNoise(fit: Fit, group: GroupFit): FittedNoise {
  const { states } = fit.rule;
  const none = states.map(() => undefined);
  const all = states.map(() => scatter(fit, group.sigma));
  return fit.options.errors === "observation"
    ? { change: none, reading: all }
    : { change: all, reading: none };
}

function scatter(fit: Fit, sigma: number): Noise {
  const { spread = "constant" } = fit.options;
  if (typeof spread === "object") return { kind: "additive", sd: spread.sd };
  if (spread === "proportional") return { kind: "log-normal-errors", sd: sigma };
  if (spread === "poisson") return { kind: "poisson" };
  return { kind: "additive", sd: sigma };
}
