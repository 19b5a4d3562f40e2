import type { Attractor } from "../../src/dynamics/index.js";
import { type Figure, figure, type Layer } from "../figures/index.js";

/** Room for so many points in a diagram, in layers of as many as a figure draws one by one. */
const layers = 7;
const layerRoom = 1700;

/** Places of values that differ to the eye: one a column and height, fewer where there are still too many. */
function visible({ values, perColumn }: Attractor): readonly number[] {
  const finite = values.filter((value) => !Number.isNaN(value));
  const least = finite.reduce((low, value) => Math.min(low, value), Number.POSITIVE_INFINITY);
  const most = finite.reduce((high, value) => Math.max(high, value), Number.NEGATIVE_INFINITY);
  const taken = new Set<string>();
  const counts = new Map<number, number>();
  const kept: number[] = [];
  values.forEach((value, i) => {
    const column = Math.floor(i / perColumn);
    const cell = `${column}:${Math.round(((value - least) / (most - least || 1)) * 300)}`;
    if (Number.isNaN(value) || taken.has(cell)) return;
    taken.add(cell);
    counts.set(column, (counts.get(column) ?? 0) + 1);
    kept.push(i);
  });
  const share = (layers * layerRoom) / kept.length;
  // Cycles are drawn whole; of clouds, multiples of an irrational number leave out evenly.
  const isCycle = (i: number): boolean => counts.get(Math.floor(i / perColumn))! <= 16;
  return kept.filter((i, k) => isCycle(i) || (k * 0.6180339887498949) % 1 < share);
}

/** The diagram of long-run values, the estimate marked with its interval. */
export function showAttractor(found: Attractor): readonly Figure[] {
  const { estimate, vary: parameter, state, perColumn } = found;
  const marks: Layer[] =
    estimate === undefined
      ? []
      : [
          { mark: "vertical", name: "estimate", x: estimate.value },
          { mark: "vertical", name: "interval, lower end", x: estimate.interval[0] },
          { mark: "vertical", name: "interval, upper end", x: estimate.interval[1] },
        ];
  const places = visible(found);
  const clouds = Array.from({ length: layers }, (_, k): Layer => {
    const part = places.filter((_, i) => i % layers === k);
    const x = part.map((i) => found.at[Math.floor(i / perColumn)]!);
    const y = part.map((i) => found.values[i]!);
    return {
      mark: "points",
      name: `${state} in the long run`,
      x,
      y,
      small: true,
      style: 0,
      inLegend: k === 0,
    };
  });
  return [
    figure({
      title: `Long-run values of ${state}`,
      x: { title: parameter, unit: found.rule.units[parameter] ?? "" },
      y: { title: state, unit: found.rule.units[state] ?? "" },
      layers: [...clouds.filter((cloud) => cloud.mark !== "points" || cloud.x.length > 0), ...marks],
      summary: `${found.at.length} values of ${parameter}, ${perColumn} long-run values at each; drawn are those that differ to the eye.`,
    }),
  ];
}
