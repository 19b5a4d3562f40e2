import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import type { GroupFit } from "../result/group-fit.js";

/** How single values scatter, with the size that a fit found. */
export type FittedScatter =
  | { readonly distribution: "normal" | "lognormal"; readonly sd: number }
  | { readonly distribution: "poisson" }
  | { readonly distribution: "negative-binomial"; readonly size: number };

/** By state: what a fit says about the scatter of single periods and of single readings. */
export interface FittedNoise {
  readonly change: readonly (FittedScatter | undefined)[];
  readonly reading: readonly (FittedScatter | undefined)[];
}

/** The noise that a fit has found, where it puts the error. */
export function fittedNoise(
  { states }: Rule,
  group: ObservedGroup,
  { filter, sigma, estimates }: Pick<GroupFit, "filter" | "sigma" | "estimates">,
  options: FitOptions,
): FittedNoise {
  const { distribution = "normal", errors } = options;
  const scatter = (sd: number): FittedScatter => {
    if (distribution === "poisson") return { distribution };
    if (distribution !== "negative-binomial") return { distribution, sd };
    return { distribution, size: 1 / estimates.find(({ name }) => name === "dispersion")!.value };
  };
  if (filter !== undefined)
    return {
      change: states.map((state) => scatter(filter.processError[state]!)),
      reading: states.map((state) => scatter(filter.observationError[state]!)),
    };
  const none = states.map(() => undefined);
  const all = states.map(() => scatter(knownSd(group, options) ?? sigma));
  return errors === "observation" ? { change: none, reading: all } : { change: all, reading: none };
}

/** The standard deviation that a future value has where it is known: of a column of them their root mean square. */
export function knownSd(group: ObservedGroup, { sd }: FitOptions): number | undefined {
  if (typeof sd !== "string") return sd;
  const squares = group.inputs[sd]!.filter(Number.isFinite).map((each) => each * each);
  return Math.sqrt(squares.reduce((sum, square) => sum + square, 0) / squares.length);
}
