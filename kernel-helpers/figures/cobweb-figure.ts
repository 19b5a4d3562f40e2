import type { DrawnEquilibrium } from "./change-figure.js";
import { equilibriumLayers } from "./equilibrium-layers.js";
import { type Axis, type Figure, figure } from "./figure.js";

/** What `cobwebFigure` draws. */
export interface CobwebFigureOptions {
  readonly title: string;
  /** The state and its unit; both axes measure it. */
  readonly state: Axis;
  /** The rule: next value against present value. */
  readonly rule: {
    readonly name: string;
    readonly present: ArrayLike<number>;
    readonly next: ArrayLike<number>;
  };
  /** A path of the rule, period by period. */
  readonly path: ArrayLike<number>;
  readonly equilibria?: readonly DrawnEquilibrium[];
  readonly notes?: readonly string[];
}

/**
 * A path of a rule as steps between its curve and the diagonal: up or down to the curve is one period, across to the
 * diagonal makes the next value the present one. Rests and cycles are seen at once.
 */
export function cobwebFigure(options: CobwebFigureOptions): Figure {
  const { title, state, rule, path, equilibria = [], notes = [] } = options;
  const still = equilibria.map(({ value }) => value);
  const first = rule.present[0] ?? 0;
  const last = rule.present[rule.present.length - 1] ?? 1;
  return figure({
    title,
    x: { ...state, title: `${state.title}, present` },
    y: { ...state, title: `${state.title}, next` },
    layers: [
      { mark: "line", name: "next = present", x: [first, last], y: [first, last], style: 4, dashed: true },
      { mark: "line", name: rule.name, x: rule.present, y: rule.next, style: 0 },
      { mark: "line", name: `path over ${path.length - 1} periods`, ...steps(path), style: 1 },
      ...equilibriumLayers(equilibria, still),
    ],
    notes,
    summary: `The path begins at ${path[0]} and after ${path.length - 1} periods is at ${path[path.length - 1]}.`,
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
