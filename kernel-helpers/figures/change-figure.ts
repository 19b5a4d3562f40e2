import { equilibriumLayers } from "./equilibrium-layers.js";
import { type Axis, type Figure, figure } from "./figure.js";
import type { Layer } from "./layer.js";
import { significant } from "./number-text.js";
import { type LineSeries, recordedStyle, ruleStyle } from "./recorded-series.js";

/** Pairs of a value and its change over the next step. */
export interface ChangePairs {
  readonly name: string;
  readonly value: ArrayLike<number>;
  readonly change: ArrayLike<number>;
  /** Pairs more than one step apart, with the change per step: drawn hollow. Default false. */
  readonly multiStep?: boolean;
}

/** An equilibrium of a rule. */
export interface EquilibriumPoint {
  readonly value: number;
  readonly stable: boolean | "undetermined";
}

/** Options of `changeFigure`. */
export interface ChangeFigureOptions {
  readonly title: string;
  readonly value: Axis;
  /** Change, ratio, or per-capita change, with its unit. */
  readonly change: Axis;
  readonly pairs: readonly ChangePairs[];
  readonly rules?: readonly LineSeries[];
  readonly equilibria?: readonly EquilibriumPoint[];
  /** The value that means no change: 0, or 1 for a ratio. Default 0. */
  readonly noChange?: number;
  readonly notes?: readonly string[];
}

/**
 * Change against value, which shows the shape of a rule. Equilibria lie on the line of no change: filled when stable,
 * open when unstable.
 */
export function changeFigure(options: ChangeFigureOptions): Figure {
  const { title, value, change, pairs, rules = [], equilibria = [], noChange = 0, notes = [] } = options;
  const layers: Layer[] = [
    {
      mark: "line",
      name: "no change",
      x: valueRange(options),
      y: [noChange, noChange],
      style: 4,
      dashed: true,
    },
    ...rules.map((rule, turn): Layer => ({ mark: "line", ...rule, style: ruleStyle(turn) })),
    ...pairs.map((pair): Layer => {
      const variant = pair.multiStep ? "open" : "plain";
      return {
        mark: "points",
        name: pair.name,
        x: pair.value,
        y: pair.change,
        variant: variant,
        style: recordedStyle,
      };
    }),
    ...equilibriumLayers(
      equilibria,
      equilibria.map(() => noChange),
    ),
  ];
  return figure({ title, x: value, y: change, layers, notes, summary: equilibriumSummary(equilibria) });
}

/** Smallest and largest value drawn. */
function valueRange({ pairs, rules = [], equilibria = [] }: ChangeFigureOptions): [number, number] {
  const drawn = [...pairs.map((pair) => pair.value), ...rules.map((rule) => rule.x as ArrayLike<number>)];
  const values = [...drawn.flatMap((each) => Array.from(each)), ...equilibria.map((each) => each.value)];
  const finite = values.filter(Number.isFinite);
  return finite.reduce<[number, number]>(
    ([least, greatest], value) => [Math.min(least, value), Math.max(greatest, value)],
    [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY],
  );
}

function equilibriumSummary(equilibria: readonly EquilibriumPoint[]): string {
  if (equilibria.length === 0) return "";
  const kind = { true: "stable", false: "unstable", undetermined: "stability undetermined" };
  const each = equilibria.map(({ value, stable }) => `${significant(value)} (${kind[`${stable}`]})`);
  return `${each.length === 1 ? "Equilibrium" : "Equilibria"}: ${each.join(", ")}.`;
}
