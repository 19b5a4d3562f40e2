import type { Figure } from "./figure.js";
import { type PlotLayout, plotLayout } from "./plot-layout.js";
import { type PlotTrace, plotTraces } from "./plot-traces.js";

/** What the plotting library draws: traces, and the layout for a given width in pixels. */
export interface PlotSpec {
  readonly data: readonly PlotTrace[];
  readonly layout: PlotLayout;
}

/** Translates a figure for the plotting library. */
export function plotSpec(figure: Figure, width: number, titled: boolean): PlotSpec {
  const data = figure.panels.flatMap((panel, at) => plotTraces(panel, at));
  return { data, layout: plotLayout(figure, data, width, titled) };
}
