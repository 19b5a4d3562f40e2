import { frozenCopy } from "../../src/numeric/index.js";
import type { PeriodAxis } from "../../src/record/index.js";
import { type Bundle, showing, type Table } from "../tables/index.js";
import { figureBundle } from "./figure-bundle.js";
import type { Layer } from "./layer.js";
import { emptyFigure } from "./refusals.js";

/** An axis: what it measures and in what unit. */
export interface Axis {
  readonly title: string;
  /** "" or absent = none. */
  readonly unit?: string;
  /** Default "linear"; "category" for names, "date" for calendar dates as ISO text. */
  readonly scale?: "linear" | "log" | "category" | "date";
  /** Ends of the axis, in its unit; default: what the layers need. */
  readonly ends?: readonly [number, number];
  /** The periods that places on the axis stand for, where these have labels; `zero` is the place of period 0. */
  readonly periods?: { readonly axis: PeriodAxis; readonly zero: number };
  /** Without ticks and grid: where places along the axis have no meaning of their own. */
  readonly bare?: boolean;
}

/** One set of axes with what is drawn on it, in drawing order. */
export interface Panel {
  /** "" for the only panel of a figure. */
  readonly title: string;
  readonly x: Axis;
  readonly y: Axis;
  readonly layers: readonly Layer[];
}

/** A figure as data: what it says, not how it looks. */
export interface Figure {
  readonly kind: "figure";
  readonly title: string;
  readonly panels: readonly Panel[];
  /** One or two sentences that say in words what the figure shows; "" when the layers' own account must do. */
  readonly summary: string;
  readonly notes: readonly string[];
  /** Tables shown as the numbers behind the figure; undefined when what is drawn are those numbers. */
  readonly numbers: readonly Table[] | undefined;
}

/** What `figure` takes: one panel's axes and layers, or several panels. */
export interface FigureOptions {
  readonly title: string;
  readonly x?: Axis;
  readonly y?: Axis;
  readonly layers?: readonly Layer[];
  readonly panels?: readonly Panel[];
  readonly summary?: string;
  readonly notes?: readonly string[];
  readonly numbers?: readonly Table[];
}

/**
 * Makes a figure that shows itself: a live plot where scripts run, a picture where they do not, and always a
 * text with the numbers behind it.
 *
 * @throws {ModelError} `empty-figure` when there are no axes, or no layer in a panel.
 * @example figure({ title: "Level", x: { title: "Week" }, y: { title: "Stock", unit: "coils" },
 *   layers: [{ mark: "points", name: "counted", x: [0, 1], y: [90, 83] }] });
 */
export function figure(options: FigureOptions): Figure {
  // Copies: the caller's lists must not be frozen, nor change the figure later.
  const { title, x, y, layers, panels: given, summary = "", notes = [], numbers } = frozenCopy(options);
  const panels = given ?? (x && y && layers ? [{ title: "", x, y, layers }] : []);
  if (panels.length === 0 || panels.some((panel) => panel.layers.length === 0)) throw emptyFigure(title);
  const made: Figure = { kind: "figure", title, panels, summary, notes, numbers };
  return showing(made, (): Promise<Bundle> => figureBundle(made));
}
