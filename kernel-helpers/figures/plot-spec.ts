import type { Figure } from "./figure.js";
import { type PlotLayout, plotLayout } from "./plot-layout.js";
import { type PlotTrace, plotTraces } from "./plot-traces.js";

/** What the plotting library draws: traces, and the layout for a given width in pixels. */
export interface PlotSpec {
  readonly data: readonly PlotTrace[];
  readonly layout: PlotLayout;
}

/**
 * Translates a figure for the plotting library.
 *
 * @param still - for a picture: it carries the figure's title, and its titles stand at fixed places, because
 *   nothing can be measured where it is drawn.
 */
export function plotSpec(figure: Figure, width: number, still: boolean): PlotSpec {
  const data = namedOnce(figure.panels.flatMap((panel, at) => plotTraces(panel, at)));
  return { data, layout: plotLayout(figure, data, width, still) };
}

/** A name that several panels share stands in the legend once. */
function namedOnce(traces: readonly PlotTrace[]): PlotTrace[] {
  const seen = new Set<unknown>();
  return traces.map((trace) => {
    const name = trace["name"];
    const showlegend = trace["showlegend"] === true && !seen.has(name);
    if (showlegend) seen.add(name);
    return { ...trace, showlegend };
  });
}
