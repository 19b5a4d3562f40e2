import { type Fit, type GroupFit, problemOf } from "../../estimate/index.js";
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

/**
 * The draw that a group's record allows. Standard deviations and dispersions stay at their estimates: what the record
 * leaves open of the two errors of a state space it does not leave open of their sum, which is what a band rests on.
 */
export function unknownsDraw(fit: Fit, group: GroupFit): UnknownsDraw {
  const together = problemOf(fit).groups !== "separate";
  const loose = together ? undefined : loosest(group);
  if (loose !== undefined) {
    const draw = drawAlongProfile(fit, group, loose);
    if (draw === undefined) throw undetermined(group);
    return { draw, method: "along the profile", followed: loose.name };
  }
  const drawn = group.estimates.flatMap(({ role }, i) => (role === "scale" ? [] : [i]));
  const size = group.estimates.length;
  const draw = parametersDraw(
    Float64Array.from(group.estimates, (estimate) => estimate.value),
    drawn,
    Float64Array.from(drawn.flatMap((i) => drawn.map((j) => group.covariance[i * size + j]!))),
    group.degreesOfFreedom,
  );
  if (draw === undefined) throw undetermined(group);
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
  const sigma = problemOf(fit).group(ground.group.group).findsSigma ? spread : undefined;
  return { paths, size, parameters, initial, method, followed, spread: sigma, discarded };
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
      return belief.scale.from(value);
    });
  };
}

function boundsOf(fit: Fit, group: GroupFit): (unknowns: Float64Array) => boolean {
  const { bounds } = problemOf(fit);
  const limits = group.estimates.map(({ name }) => bounds(name));
  return (unknowns) => limits.every(([low, high], i) => unknowns[i]! >= low && unknowns[i]! <= high);
}

function undetermined({ group, estimates }: GroupFit): Error {
  const open = estimates.filter(
    ({ standardError, role }) => standardError === undefined && role === "parameter",
  );
  const twoErrors = estimates.some(({ name }) => name.startsWith("observation error"));
  return refuseUndetermined(
    group,
    open.map(({ name }) => name),
    twoErrors,
  );
}
