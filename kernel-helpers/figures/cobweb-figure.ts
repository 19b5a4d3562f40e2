import { plural } from "../wording/index.js";
import type { EquilibriumPoint } from "./change-figure.js";
import { equilibriumLayers } from "./equilibrium-layers.js";
import { type Axis, type Figure, figure } from "./figure.js";
import { significant } from "./number-text.js";

/** Options of `cobwebFigure`. */
export interface CobwebFigureOptions {
  readonly title: string;
  /** The state and its unit, on both axes. */
  readonly state: Axis;
  /** The rule: next value against present value. */
  readonly rule: {
    readonly name: string;
    readonly present: ArrayLike<number>;
    readonly next: ArrayLike<number>;
  };
  /** A trajectory of the rule, period by period. */
  readonly trajectory: ArrayLike<number>;
  readonly equilibria?: readonly EquilibriumPoint[];
  readonly notes?: readonly string[];
}

/**
 * Cobweb plot: a trajectory as steps between the curve of the rule and the diagonal. Equilibria and cycles are visible
 * at once.
 */
export function cobwebFigure(options: CobwebFigureOptions): Figure {
  const { title, state, rule, trajectory, equilibria = [], notes = [] } = options;
  const heights = equilibria.map(({ value }) => value);
  const first = rule.present[0] ?? 0;
  const last = rule.present[rule.present.length - 1] ?? 1;
  const periods = trajectory.length - 1;
  const at = (period: number): string => significant(trajectory[period] ?? Number.NaN);
  return figure({
    title,
    x: { ...state, title: `${state.title} at t` },
    y: { ...state, title: `${state.title} at t + 1` },
    layers: [
      { mark: "line", name: "no change", x: [first, last], y: [first, last], style: 4, dashed: true },
      { mark: "line", name: rule.name, x: rule.present, y: rule.next, style: 0 },
      {
        mark: "line",
        name: `trajectory over ${plural(periods, "period")}`,
        ...steps(trajectory),
        style: 1,
      },
      ...equilibriumLayers(equilibria, heights),
    ],
    notes,
    summary: `The trajectory starts at ${at(0)} and is at ${at(periods)} after ${plural(periods, "period")}.`,
  });
}

/** Corners of the steps: (x0, x1), (x1, x1), (x1, x2), ... from (x0, x0). */
function steps(path: ArrayLike<number>): { x: number[]; y: number[] } {
  const values = Array.from(path);
  const x = values.slice(0, -1).flatMap((value) => [value, value]);
  const y = values.slice(1).flatMap((next, i) => [values[i] as number, next]);
  const end = values.at(-1) ?? Number.NaN;
  return { x: [...x, end], y: [...y, end] };
}
