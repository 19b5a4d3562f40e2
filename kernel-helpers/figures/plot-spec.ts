import type { Figure } from "./figure.js";
import { type PlotLayout, plotLayout } from "./plot-layout.js";
import { type PlotTrace, plotTraces } from "./plot-traces.js";

/** Input of the plotting library: traces, and the layout for a width in pixels. */
export interface PlotSpec {
  readonly data: readonly PlotTrace[];
  readonly layout: PlotLayout;
}

/**
 * Translates a figure for the plotting library.
 *
 * @param still - for a picture: includes the title, and places axis titles at fixed positions, because text cannot be
 *   measured without a screen.
 */
export function plotSpec(figure: Figure, width: number, still: boolean): PlotSpec {
  const data = uniqueLegendNames(figure.panels.flatMap((panel, at) => plotTraces(panel, at)));
  return { data, layout: plotLayout(figure, data, width, still) };
}

/** A name shared by several panels is in the legend once. */
function uniqueLegendNames(traces: readonly PlotTrace[]): PlotTrace[] {
  const seen = new Set<unknown>();
  return traces.map((trace) => {
    const name = trace["name"];
    const showlegend = trace["showlegend"] === true && !seen.has(name);
    if (showlegend) seen.add(name);
    return { ...trace, showlegend };
  });
}
