import { frozenCopy } from "../../src/numeric/index.js";
import type { PeriodAxis } from "../../src/record/index.js";
import { type Bundle, showing, type Table } from "../tables/index.js";
import { emptyFigureError } from "./errors.js";
import { figureBundle } from "./figure-bundle.js";
import type { Layer } from "./layer.js";

/** An axis: title, unit and scale. */
export interface Axis {
  readonly title: string;
  /** "" or absent = none. */
  readonly unit?: string;
  /** Default "linear"; "category" for names, "date" for calendar dates as ISO text. */
  readonly scale?: "linear" | "log" | "category" | "date";
  /** Range of the axis, in its unit. Default: the range of the layers. */
  readonly ends?: readonly [number, number];
  /** Periods of the axis where these have labels; `zero` is the position of period 0. */
  readonly periods?: { readonly axis: PeriodAxis; readonly zero: number };
  /** Without ticks and grid, for an axis without a meaning of its own. */
  readonly bare?: boolean;
}

/** One set of axes with its layers, in drawing order. */
export interface Panel {
  /** "" for the only panel of a figure. */
  readonly title: string;
  readonly x: Axis;
  readonly y: Axis;
  readonly layers: readonly Layer[];
}

/** A figure as data: its content, not its style. */
export interface Figure {
  readonly kind: "figure";
  readonly title: string;
  readonly panels: readonly Panel[];
  /** One or two sentences on what the figure shows; "" to rely on the description of its layers. */
  readonly summary: string;
  readonly notes: readonly string[];
  /** Tables with the data of the figure; undefined to list what is drawn. */
  readonly numbers: readonly Table[] | undefined;
}

/** Options of `figure`: axes and layers of one panel, or several panels. */
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
 * Makes a figure: an interactive plot where scripts run, a picture where they do not, and always a text with its data.
 *
 * @throws {ModelError} `empty-figure` when there are no axes, or no layer in a panel.
 * @example figure({ title: "Level", x: { title: "Week" }, y: { title: "Stock", unit: "coils" },
 *   layers: [{ mark: "points", name: "counted", x: [0, 1], y: [90, 83] }] });
 */
export function figure(options: FigureOptions): Figure {
  // Copies: the caller's lists must not be frozen, nor change the figure later.
  const { title, x, y, layers, panels: given, summary = "", notes = [], numbers } = frozenCopy(options);
  const panels = given ?? (x && y && layers ? [{ title: "", x, y, layers }] : []);
  if (panels.length === 0 || panels.some((panel) => panel.layers.length === 0)) throw emptyFigureError(title);
  const made: Figure = { kind: "figure", title, panels, summary, notes, numbers };
  return showing(made, (): Promise<Bundle> => figureBundle(made));
}
