import { type NoiseStream, noiseStream } from "../../dynamics/index.js";
import type { RandomStream } from "../../numeric/index.js";
import type { NoiseDraw, NoiseLot } from "../noise/noise.js";
import { blockSize } from "./block-streams.js";

/** Scatters `count` values that stand `apart` places from each other; ended ones stay as they are. */
export type Scatter = (
  draw: NoiseDraw,
  values: Float64Array,
  from: number,
  apart: number,
  count: number,
  block: number,
) => void;

/** Normal errors come by the lot, all others one by one. */
export function scatterer(
  streams: readonly RandomStream[],
  draws: readonly (NoiseDraw | undefined)[],
  spread: Float64Array | undefined,
): Scatter {
  const byLot = draws.some((draw) => draw?.lot !== undefined);
  const lots = byLot ? streams.map((stream) => noiseStream(Math.floor(stream.uniform() * 2 ** 53))) : [];
  return (draw, values, from, apart, count, block) => {
    if (draw.lot === undefined) scatterEach(draw, values, from, apart, count, streams[block]!);
    else if (spread === undefined) scatterLot(draw.lot, values, from, apart, count, lots[block]!);
    else {
      const own = spread.subarray(block * blockSize);
      scatterWidened(draw.lot, values, from, apart, lots[block]!.normals(count), own);
    }
  };
}

function scatterLot(
  { kind, centre, sd }: NoiseLot,
  values: Float64Array,
  from: number,
  apart: number,
  count: number,
  stream: NoiseStream,
): void {
  if (kind === "factors") {
    const factors = stream.factors(count, centre, sd);
    for (let i = 0, at = from; i < count; i++, at += apart) values[at]! *= factors[i]!;
    return;
  }
  const normals = stream.normals(count);
  for (let i = 0, at = from; i < count; i++, at += apart) values[at]! += sd * normals[i]!;
}

/** Normal errors of paths that each have a sigma of their own. */
function scatterWidened(
  { kind, centre, sd }: NoiseLot,
  values: Float64Array,
  from: number,
  apart: number,
  normals: Float64Array,
  spread: Float64Array,
): void {
  for (let i = 0, at = from; i < normals.length; i++, at += apart) {
    const error = sd * spread[i]! * normals[i]!;
    if (kind === "factors") values[at]! *= Math.exp(centre + error);
    else values[at]! += error;
  }
}

function scatterEach(
  draw: NoiseDraw,
  values: Float64Array,
  from: number,
  apart: number,
  count: number,
  stream: RandomStream,
): void {
  for (let i = 0, at = from; i < count; i++, at += apart) {
    const value = values[at]!;
    if (!Number.isNaN(value)) values[at] = draw(value, stream);
  }
}
