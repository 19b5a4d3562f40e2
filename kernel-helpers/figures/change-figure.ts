import { equilibriumLayers } from "./equilibrium-layers.js";
import { type Axis, type Figure, figure } from "./figure.js";
import type { Layer } from "./layer.js";
import { significant } from "./number-text.js";
import { type DrawnLine, recordedStyle, ruleStyle } from "./recorded-series.js";

/** Pairs of a value and what became of it one step later. */
export interface ChangePairs {
  readonly name: string;
  readonly value: ArrayLike<number>;
  readonly change: ArrayLike<number>;
  /** Pairs more than a step apart, given per step: drawn hollow. Default false. */
  readonly overGap?: boolean;
}

/** A value at which a rule stands still. */
export interface DrawnEquilibrium {
  readonly value: number;
  readonly stable: boolean | "undetermined";
}

/** What `changeFigure` draws. */
export interface ChangeFigureOptions {
  readonly title: string;
  readonly value: Axis;
  /** Change, ratio, or change per head, with its unit. */
  readonly change: Axis;
  readonly pairs: readonly ChangePairs[];
  readonly rules?: readonly DrawnLine[];
  readonly equilibria?: readonly DrawnEquilibrium[];
  /** Change that means standing still: 0, or 1 for a ratio. Default 0. */
  readonly still?: number;
  readonly notes?: readonly string[];
}

/**
 * Change against value: the picture in which a rule of change is seen. Equilibria stand on the line of no change,
 * filled when stable, open when not.
 */
export function changeFigure(options: ChangeFigureOptions): Figure {
  const { title, value, change, pairs, rules = [], equilibria = [], still = 0, notes = [] } = options;
  const layers: Layer[] = [
    { mark: "line", name: "no change", x: reach(options), y: [still, still], style: 4, dashed: true },
    ...rules.map((rule, turn): Layer => ({ mark: "line", ...rule, style: ruleStyle(turn) })),
    ...pairs.map((pair): Layer => {
      const look = pair.overGap ? "open" : "plain";
      return { mark: "points", name: pair.name, x: pair.value, y: pair.change, look, style: recordedStyle };
    }),
    ...equilibriumLayers(
      equilibria,
      equilibria.map(() => still),
    ),
  ];
  return figure({ title, x: value, y: change, layers, notes, summary: standsStill(equilibria) });
}

/** From the least to the greatest value drawn. */
function reach({ pairs, rules = [], equilibria = [] }: ChangeFigureOptions): [number, number] {
  const drawn = [...pairs.map((pair) => pair.value), ...rules.map((rule) => rule.x as ArrayLike<number>)];
  const values = [...drawn.flatMap((each) => Array.from(each)), ...equilibria.map((each) => each.value)];
  const finite = values.filter(Number.isFinite);
  return finite.reduce<[number, number]>(
    ([least, greatest], value) => [Math.min(least, value), Math.max(greatest, value)],
    [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY],
  );
}

function standsStill(equilibria: readonly DrawnEquilibrium[]): string {
  if (equilibria.length === 0) return "";
  const kind = { true: "stable", false: "unstable", undetermined: "stability undetermined" };
  const each = equilibria.map(({ value, stable }) => `${significant(value)} (${kind[`${stable}`]})`);
  return `The rule stands still at ${each.join(", ")}.`;
}
