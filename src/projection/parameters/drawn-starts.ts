import type { Fit, GroupFit } from "../../estimate/index.js";
import { choleskyFactor, type RandomStream } from "../../numeric/index.js";
import { blockSize } from "../ensemble/block-streams.js";
import type { Starts } from "../ensemble/ensemble.js";
import type { FitGround } from "../fit-ground.js";
import { refuseNoDraws, refuseUndetermined } from "../refusals.js";
import { drawAlongProfile, loosest } from "./draw-along-profile.js";
import { type ParametersDraw, parametersDraw } from "./draw-parameters.js";

/** How parameters were drawn: around the estimates, or along the profile of what the record leaves open. */
export type DrawMethod = "around the estimates" | "along the profile";

/** Starts drawn from a fit. */
export interface DrawnStarts extends Starts {
  readonly method: DrawMethod;
  /** The unknown whose profile was followed. */
  readonly followed: string | undefined;
  /** [paths]: sigma of each draw as a multiple of the estimate; absent where other spreads were fitted. */
  readonly spread: Float64Array | undefined;
  /** Draws thrown away because an unknown left its bounds. */
  readonly discarded: number;
}

/** A way of drawing the unknowns of a group. */
export interface UnknownsDraw {
  readonly draw: ParametersDraw;
  readonly method: DrawMethod;
  readonly followed: string | undefined;
}

/** Draws thrown away for each one kept, at most. */
const patience = 200;

/** The draw that a group's record allows. */
export function unknownsDraw(fit: Fit, group: GroupFit): UnknownsDraw {
  const together = fit.options.groups !== undefined && fit.options.groups !== "separate";
  const loose = together ? undefined : loosest(group);
  if (loose !== undefined) {
    const draw = drawAlongProfile(fit, group, loose);
    if (draw === undefined) throw refuseUndetermined(group.group, openNames(group));
    return { draw, method: "along the profile", followed: loose.name };
  }
  const estimates = Float64Array.from(group.estimates, (estimate) => estimate.value);
  const draw = parametersDraw(estimates, Float64Array.from(group.covariance), group.degreesOfFreedom);
  if (draw === undefined) throw refuseUndetermined(group.group, openNames(group));
  return { draw, method: "around the estimates", followed: undefined };
}

/** Draws a start for every path; one whose unknowns leave their bounds is drawn again. */
export function drawnStarts(
  fit: Fit,
  ground: FitGround,
  source: UnknownsDraw,
  paths: number,
  streams: readonly RandomStream[],
): DrawnStarts {
  const size = ground.parameters.length;
  const width = ground.initial.length;
  const parameters = new Float64Array(paths * size);
  const initial = new Float64Array(paths * width);
  const unknowns = new Float64Array(ground.group.estimates.length);
  const stands = boundsOf(fit, ground.group);
  const begin = beginning(ground);
  const spread = new Float64Array(paths);
  let discarded = 0;
  for (let path = 0; path < paths; path++) {
    const stream = streams[Math.floor(path / blockSize)]!;
    spread[path] = source.draw(stream, unknowns);
    while (!stands(unknowns)) {
      if (++discarded > patience * (path + 1)) throw refuseNoDraws(ground.group.group);
      spread[path] = source.draw(stream, unknowns);
    }
    parameters.set(ground.parameters, path * size);
    initial.set(begin(stream), path * width);
    ground.places.forEach((place, i) => {
      if (place >= size) initial[path * width + place - size] = unknowns[i]!;
      else if (place >= 0) parameters[path * size + place] = unknowns[i]!;
    });
  }
  const { method, followed } = source;
  const sigma = hasSigma(fit) ? spread : undefined;
  return { paths, size, parameters, initial, method, followed, spread: sigma, discarded };
}

/** Whether a fit's scatter is the sigma of its residuals, and not a likelihood's own spread or a given one. */
function hasSigma({ options }: Fit): boolean {
  const { distribution: spread = "normal", errors } = options;
  return errors !== "both" && (spread === "normal" || spread === "lognormal");
}

/** The first state vector of a path: known, or drawn from what a filter believes of it. */
function beginning({ belief, initial }: FitGround): (stream: RandomStream) => Float64Array {
  const size = initial.length;
  const factor = belief && choleskyFactor(belief.covariance, size);
  if (belief === undefined || factor === undefined) return () => initial;
  const normals = new Float64Array(size);
  return (stream) => {
    for (let i = 0; i < size; i++) normals[i] = stream.normal();
    return Float64Array.from(belief.mean, (mean, i) => {
      let value = mean;
      for (let k = 0; k <= i; k++) value += factor[i * size + k]! * normals[k]!;
      return belief.log ? Math.exp(value) : value;
    });
  };
}

function boundsOf(fit: Fit, group: GroupFit): (unknowns: Float64Array) => boolean {
  const limits = group.estimates.map(({ name }) => fit.options.bounds?.[name] ?? fit.rule.bounds[name]);
  return (unknowns) =>
    limits.every((limit, i) => limit === undefined || (unknowns[i]! >= limit[0] && unknowns[i]! <= limit[1]));
}

function openNames(group: GroupFit): readonly string[] {
  return group.estimates.filter((each) => each.standardError === undefined).map((each) => each.name);
}
