import { boundedPath } from "../../dynamics/index.js";
import { type Fit, type GroupFit, problemOf } from "../../estimate/index.js";
import { choleskyFactor, type RandomStream } from "../../numeric/index.js";
import { stateBounds } from "../../rule/index.js";
import { blockSize } from "../ensemble/block-streams.js";
import type { Starts } from "../ensemble/ensemble.js";
import type { FitGround } from "../fit-ground.js";
import { refuseNoDraws, refuseUndetermined } from "../refusals.js";
import { drawAlongProfile, loosest, mostBent } from "./draw-along-profile.js";
import { type DrawnUnknowns, type ParametersDraw, parametersDraw, recordRatio } from "./draw-parameters.js";

/** How parameters were drawn: around the estimates, or along the profile of what the record leaves open. */
export type DrawMethod = "around the estimates" | "along the profile";

/** Starts drawn from a fit. */
export interface DrawnStarts extends Starts {
  readonly method: DrawMethod;
  /** The unknown whose profile was followed. */
  readonly followed: string | undefined;
  /** [paths]: sigma of each draw as a multiple of the estimate; absent where other spreads were fitted. */
  readonly spread: Float64Array | undefined;
  /** By state: [paths], the factor through which each draw's record reads it. */
  readonly factors: readonly (Float64Array | undefined)[];
  /** Draws thrown away because an unknown left its bounds, or the path through the record those of a state. */
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

/** Up to which ratio draws that the record finds likelier than they are drawn are made up for, by keeping fewer others. */
const largestRatio = 2;

/** Draws after which the record's doubts about them are let be. */
const mostTries = 40;

/**
 * The draw that a group's record allows. Standard deviations and dispersions stay at their estimates: what the record
 * leaves open of the two errors of a state space it does not leave open of their sum, which is what a band rests on.
 */
export function unknownsDraw(fit: Fit, group: GroupFit): UnknownsDraw {
  const known = drawn.get(group) ?? drawOf(fit, group);
  drawn.set(group, known);
  return known;
}

/** Following a profile takes some fifty fits, and one fit is asked many questions. */
const drawn = new WeakMap<GroupFit, UnknownsDraw>();

function drawOf(fit: Fit, group: GroupFit): UnknownsDraw {
  const together = problemOf(fit).groups !== "separate";
  const loose = together ? undefined : loosest(group);
  if (loose !== undefined) {
    const draw = drawAlongProfile(fit, group, loose);
    if (draw === undefined) throw undetermined(group);
    return { draw, method: "along the profile", followed: loose.name };
  }
  const bent = together ? undefined : mostBent(group);
  const along = bent && drawAlongProfile(fit, group, bent);
  if (along !== undefined) return { draw: along, method: "along the profile", followed: bent!.name };
  const free = group.estimates.flatMap(({ role }, i) => (role === "scale" ? [] : [i]));
  const size = group.estimates.length;
  const draw = parametersDraw(
    Float64Array.from(group.estimates, (estimate) => estimate.value),
    free,
    Float64Array.from(free.flatMap((i) => free.map((j) => group.covariance[i * size + j]!))),
    group.degreesOfFreedom,
  );
  if (draw === undefined) throw undetermined(group);
  return { draw, method: "around the estimates", followed: undefined };
}

/** What is drawn for one path. */
interface DrawnRow {
  readonly parameters: Float64Array;
  readonly initial: Float64Array;
}

/** Draws a start for every path; one that cannot be meant, or that the record finds unlikely, is drawn again. */
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
  const stands = standsOf(fit, ground);
  const begin = beginning(ground);
  const { increase, findsSigma } = problemOf(fit).group(ground.group.group);
  const { degreesOfFreedom, estimates } = ground.group;
  const free = estimates.filter(({ role }) => role !== "scale").length;
  const spread = new Float64Array(paths);
  const factors = ground.factors.map((factor) => factor && new Float64Array(paths));
  let discarded = 0;
  for (let path = 0; path < paths; path++) {
    const stream = streams[Math.floor(path / blockSize)]!;
    const own = {
      parameters: parameters.subarray(path * size, (path + 1) * size),
      initial: initial.subarray(path * width, (path + 1) * width),
    };
    let drawn = drawOne(stream, own);
    for (let tries = 0; !stands(unknowns, own) || !isLikely(drawn, stream, tries); tries++) {
      if (!stands(unknowns, own) && ++discarded > patience * (path + 1))
        throw refuseNoDraws(ground.group.group);
      drawn = drawOne(stream, own);
    }
    spread[path] = drawn.sigma;
    ground.factors.forEach((factor, s) => {
      if (factor !== undefined) factors[s]![path] = unknowns[factor.unknown]!;
    });
  }
  const { method, followed } = source;
  const sigma = findsSigma ? spread : undefined;
  return { paths, size, parameters, initial, method, followed, spread: sigma, factors, discarded };

  function drawOne(stream: RandomStream, own: DrawnRow): DrawnUnknowns {
    const drawn = source.draw(stream, unknowns);
    own.parameters.set(ground.parameters);
    own.initial.set(begin(stream));
    ground.places.forEach((place, i) => {
      if (place >= size) own.initial[place - size] = unknowns[i]!;
      else if (place >= 0) own.parameters[place] = unknowns[i]!;
    });
    return drawn;
  }

  /** Keeps a draw as often as the record finds it likely; where hardly any is, the next that stands. */
  function isLikely(drawn: DrawnUnknowns, stream: RandomStream, tries: number): boolean {
    if (increase === undefined || tries >= mostTries) return true;
    const ratio = recordRatio(increase(unknowns), drawn, degreesOfFreedom, free, findsSigma);
    return stream.uniform() < ratio / largestRatio;
  }
}

/** The first state vector of a path: known, or drawn from what a filter believes of it. */
function beginning({ filtered, initial }: FitGround): (stream: RandomStream) => Float64Array {
  const size = initial.length;
  const factor = filtered && choleskyFactor(filtered.covariance, size);
  if (filtered === undefined || factor === undefined) return () => initial;
  const normals = new Float64Array(size);
  return (stream) => {
    for (let i = 0; i < size; i++) normals[i] = stream.normal();
    return Float64Array.from(filtered.mean, (mean, i) => {
      let value = mean;
      for (let k = 0; k <= i; k++) value += factor[i * size + k]! * normals[k]!;
      return filtered.scale.from(value);
    });
  };
}

/**
 * Whether a draw can be meant: its unknowns lie within their bounds, and its path through the record within those of the
 * states, where the fitted path does. A stock that dies out within the record contradicts the readings after it.
 */
function standsOf(fit: Fit, ground: FitGround): (unknowns: Float64Array, own: DrawnRow) => boolean {
  const { group, rule, compiled, inputs, from, present: periods } = ground;
  const limits = group.estimates.map(({ name }) => problemOf(fit).bounds(name));
  const bounds = stateBounds(rule);
  const stays = (own: DrawnRow): boolean =>
    boundedPath(compiled, bounds, { ...own, inputs, from, periods }).reached.length === 0;
  const looked = periods > 0 && rule.states.some((state) => rule.bounds[state]) && stays(ground);
  return (unknowns, own) =>
    limits.every(([low, high], i) => unknowns[i]! >= low && unknowns[i]! <= high) && (!looked || stays(own));
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
