import { findRoot, quantile, randomStream } from "../../numeric/index.js";
import { blockStreams, drawnStarts, type Ground, unknownsDraw } from "../../projection/index.js";
import type { SettingMargin, Target } from "../choice/solution.js";
import { measureReader } from "../measure/read-measure.js";
import type { Setting } from "./set-value.js";
import type { Standing } from "./standing.js";

/** Draws that are solved. */
const draws = 400;

/**
 * The setting that meets the target at drawn parameters, draw by draw; undefined for a rule, whose parameters are given.
 */
export function settingMargin(
  standing: Standing,
  setting: Setting,
  target: Target,
  root: number,
  level: number,
): SettingMargin | undefined {
  if (standing.fit === undefined) return undefined;
  const aim = target.is ?? target.atMost ?? target.atLeast ?? 0;
  const read = measureReader(standing, target);
  const found: number[] = [];
  for (const drawn of drawnGrounds(standing, draws)) {
    const near = solvedNear((value) => read(setting.at(value, drawn)) - aim, root);
    if (near !== undefined) found.push(near);
  }
  const without = 1 - found.length / draws;
  const sorted = Float64Array.from(found).sort();
  const tail = (1 - level) / 2;
  const limit = (probability: number): number | undefined =>
    sorted.length === 0 || without > tail ? undefined : quantile(sorted, probability);
  return { lower: limit(tail), upper: limit(1 - tail), without };
}

/** Grounds with the fit's unknowns drawn. */
export function drawnGrounds(standing: Standing, count: number): readonly Ground[] {
  const ground = standing.fitGround!;
  const source = unknownsDraw(standing.fit!, ground.group);
  const streams = blockStreams(randomStream(standing.seed), count);
  const starts = drawnStarts(standing.fit!, ground, source, count, streams);
  const width = ground.initial.length;
  return Array.from({ length: count }, (_, path) => ({
    ...ground,
    parameters: starts.parameters.slice(path * starts.size, (path + 1) * starts.size),
    initial: starts.initial.slice(path * width, (path + 1) * width),
  }));
}

/** The crossing nearest to a place, looked for in growing steps. */
function solvedNear(excess: (value: number) => number, place: number): number | undefined {
  const scale = Math.abs(place) || 1;
  const centre = excess(place);
  if (centre === 0) return place;
  for (let k = -6; k <= 2; k++) {
    const step = scale * 2 ** k;
    for (const other of [place + step, place - step]) {
      const there = excess(other);
      if (Number.isFinite(there) && Number.isFinite(centre) && there > 0 !== centre > 0)
        return findRoot(excess, place, other, { tolerance: 1e-9 * scale });
    }
  }
  return undefined;
}
