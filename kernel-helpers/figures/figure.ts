import { frozenCopy } from "../../src/numeric/index.js";
import type { PeriodAxis } from "../../src/record/index.js";
import { checkCall } from "../options/index.js";
import { type Bundle, showing, type Table } from "../tables/index.js";
import { emptyFigureError } from "./errors.js";
import { figureBundle } from "./figure-bundle.js";
import type { Layer } from "./layer.js";

/** An axis: title, unit and scale. */
export interface Axis {
  /** What the axis measures. */
  readonly title: string;
  /** Its unit; default "" (none). */
  readonly unit?: string;
  /**
   * How places lie along it: "category" for names, "date" for calendar dates as ISO text; default "linear".
   */
  readonly scale?: "linear" | "log" | "category" | "date";
  /** Ends of the axis, in its unit; default what the layers need. */
  readonly ends?: readonly [number, number];
  /** The periods that places on the axis stand for, where these have labels; `zero` is the place of period 0. */
  readonly periods?: {
    /** Axis of the periods. */
    readonly axis: PeriodAxis;
    /** Place of period 0. */
    readonly zero: number;
  };
  /**
   * Whether it has no ticks and grid: where places along the axis have no meaning of their own; default
   * false.
   */
  readonly bare?: boolean;
}

/** One set of axes with its layers, in drawing order. */
export interface Panel {
  /** Title of the panel; "" for the only one of a figure. */
  readonly title: string;
  /** Horizontal axis. */
  readonly x: Axis;
  /** Vertical axis. */
  readonly y: Axis;
  /** What is drawn, in drawing order. */
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
  /** Title of the figure. */
  readonly title: string;
  /** Horizontal axis of the only panel. */
  readonly x?: Axis;
  /** Vertical axis of the only panel. */
  readonly y?: Axis;
  /** What is drawn on the only panel, in drawing order. */
  readonly layers?: readonly Layer[];
  /** Several panels, in place of `x`, `y` and `layers`. */
  readonly panels?: readonly Panel[];
  /** One or two sentences that say in words what the figure shows. */
  readonly summary?: string;
  /** What stands below the figure. */
  readonly notes?: readonly string[];
  /** Tables shown as the numbers behind the figure; default what is drawn. */
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
  checkCall("figure", arguments);
  // Copies: the caller's lists must not be frozen, nor change the figure later.
  const { title, x, y, layers, panels: given, summary = "", notes = [], numbers } = frozenCopy(options);
  const panels = given ?? (x && y && layers ? [{ title: "", x, y, layers }] : []);
  if (panels.length === 0 || panels.some((panel) => panel.layers.length === 0)) throw emptyFigureError(title);
  const made: Figure = { kind: "figure", title, panels, summary, notes, numbers };
  return showing(made, (): Promise<Bundle> => figureBundle(made));
}
