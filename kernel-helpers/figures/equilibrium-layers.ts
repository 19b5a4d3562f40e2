import type { DrawnEquilibrium } from "./change-figure.js";
import type { Layer } from "./layer.js";

/**
 * Equilibria as large marks: filled when stable, open when not, of another shape when undetermined.
 *
 * @param heights - where each stands on the upright axis, in their order.
 */
export function equilibriumLayers(
  equilibria: readonly DrawnEquilibrium[],
  heights: readonly number[],
): Layer[] {
  const kinds = [
    { name: "stable equilibrium", stable: true, look: "plain", style: 0 },
    { name: "unstable equilibrium", stable: false, look: "open", style: 0 },
    { name: "equilibrium, stability undetermined", stable: "undetermined", look: "open", style: 5 },
  ] as const;
  return kinds.flatMap(({ name, stable, look, style }): Layer[] => {
    const places = [...equilibria.keys()].filter((i) => equilibria[i]?.stable === stable);
    const x = places.map((i) => equilibria[i]?.value as number);
    const y = places.map((i) => heights[i] as number);
    return places.length === 0 ? [] : [{ mark: "points", name, x, y, look, style, large: true }];
  });
}
