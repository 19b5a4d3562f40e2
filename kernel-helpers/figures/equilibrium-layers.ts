import type { EquilibriumPoint } from "./change-figure.js";
import type { Layer } from "./layer.js";

/**
 * Equilibria as large marks: filled when stable, open when unstable, another shape when undetermined.
 *
 * @param heights - their positions on the vertical axis, in the same order.
 */
export function equilibriumLayers(
  equilibria: readonly EquilibriumPoint[],
  heights: readonly number[],
): Layer[] {
  const kinds = [
    { name: "stable equilibrium", stable: true, variant: "plain", style: 0 },
    { name: "unstable equilibrium", stable: false, variant: "open", style: 0 },
    { name: "equilibrium, stability undetermined", stable: "undetermined", variant: "open", style: 5 },
  ] as const;
  return kinds.flatMap(({ name, stable, variant, style }): Layer[] => {
    const places = [...equilibria.keys()].filter((i) => equilibria[i]?.stable === stable);
    const x = places.map((i) => equilibria[i]?.value as number);
    const y = places.map((i) => heights[i] as number);
    return places.length === 0 ? [] : [{ mark: "points", name, x, y, variant: variant, style, large: true }];
  });
}
