import { theme, typeface } from "../tables/index.js";
import type { Axis, Figure, Panel } from "./figure.js";
import { type PanelPosition, panelLayout } from "./panel-layout.js";
import { panelMarks } from "./plot-marks.js";
import { axisTitle, plotText } from "./plot-text.js";
import { axisName, type PlotTrace } from "./plot-traces.js";
import { periodTicks } from "./position-labels.js";
import { hasYearAxis } from "./year-axis.js";

/** Layout for the plotting library; `height` in pixels. */
export type PlotLayout = Readonly<Record<string, unknown>> & { readonly height: number };

/** Lays out panels, axes, marks and legend for a width in pixels; `still` as in `plotSpec`. */
export function plotLayout(
  figure: Figure,
  data: readonly PlotTrace[],
  width: number,
  still: boolean,
): PlotLayout {
  const places = panelLayout(figure.panels, width, still ? titleHeight(figure.title, width) : 0, data);
  const each = figure.panels.map((panel, at) => ({ panel, at, place: places.panels[at] as PanelPosition }));
  const marks = each.map(({ panel, at, place }) => panelMarks(panel, at, place));
  return {
    width,
    height: places.height,
    margin: places.margin,
    paper_bgcolor: theme.background,
    plot_bgcolor: theme.background,
    font: { family: typeface, size: 13, color: theme.text },
    hoverlabel: { font: { family: typeface, size: 13 } },
    showlegend: data.filter((trace) => trace["showlegend"]).length > 1,
    legend: { orientation: "h", x: 0, xanchor: "left", y: places.legend, yanchor: "bottom" },
    shapes: marks.flatMap((mark) => mark.shapes),
    annotations: [
      ...marks.flatMap((mark) => mark.annotations),
      ...each.flatMap(({ panel, at, place }) => panelHeading(panel, at, place)),
      ...(still ? each.flatMap(({ panel, at, place }) => stillTitles(panel, at, place)) : []),
    ],
    bargap: 0.35,
    ...(still ? { title: pictureTitle(figure.title, width) } : {}),
    ...Object.fromEntries(each.flatMap(({ panel, at, place }) => panelAxes(panel, at, place, still))),
  };
}

function titleColumns(width: number): number {
  return Math.floor(width / 9.5);
}

function titleHeight(title: string, width: number): number {
  return plotText(title, titleColumns(width), 3).split("<br>").length * 21 + 6;
}

function pictureTitle(title: string, width: number): object {
  const text = `<b>${plotText(title, titleColumns(width), 3)}</b>`;
  return {
    text,
    font: { size: 16 },
    x: 0,
    xref: "container",
    xanchor: "left",
    y: 1,
    yref: "container",
    yanchor: "top",
    pad: { l: 8, t: 8 },
  };
}

function panelAxes(panel: Panel, at: number, place: PanelPosition, still: boolean): [string, object][] {
  const x = axisName("x", at);
  const y = axisName("y", at);
  const long = (name: string): string => name.replace(/^[xy]/, (letter) => `${letter}axis`);
  const across = axisOptions(panel.x, place.columns, still);
  const years = hasYearAxis(panel) ? { separatethousands: false } : {};
  const ticks = panel.x.bare ? undefined : periodTicks(panel, place.columns);
  const labelled = ticks && { tickmode: "array", ...ticks };
  return [
    [long(x), { ...across, ...years, ...labelled, domain: place.x, anchor: y }],
    [long(y), { ...axisOptions(panel.y, place.rows, still), domain: place.y, anchor: x }],
  ];
}

function axisOptions(axis: Axis, columns: number, still: boolean): object {
  const type = axis.scale === undefined ? "linear" : axis.scale;
  const ends = type === "log" ? axis.ends?.map(Math.log10) : axis.ends;
  return {
    ...(still
      ? {}
      : { title: { text: plotText(axisTitle(axis), columns, 3), standoff: 8, font: { size: 13 } } }),
    type,
    ...(ends ? { range: ends } : {}),
    ...(type === "category" ? { autorange: "reversed" } : {}),
    automargin: !still,
    ...(still ? { ticklabeloverflow: "allow" } : {}),
    ...(type === "category" ? {} : { tickangle: 0 }),
    showline: true,
    linecolor: theme.mutedText,
    linewidth: 1.5,
    ticks: "outside",
    tickcolor: theme.mutedText,
    ticklen: 5,
    // Transparent, because marks are drawn below the grid and must stay visible.
    gridcolor: "rgba(22,38,46,0.11)",
    zeroline: false,
    ...(axis.bare ? { showticklabels: false, showgrid: false, ticks: "", showline: false } : {}),
    nticks: columns < 50 ? 5 : 8,
    separatethousands: true,
    exponentformat: "power",
    minexponent: 6,
  };
}

function stillTitles(panel: Panel, at: number, place: PanelPosition): object[] {
  const where = {
    xref: `${axisName("x", at)} domain`,
    yref: `${axisName("y", at)} domain`,
    showarrow: false,
  };
  const x = { text: plotText(axisTitle(panel.x), place.columns), x: 0.5, y: 0, yanchor: "top", yshift: -24 };
  const y = {
    text: plotText(axisTitle(panel.y), place.rows),
    x: 0,
    y: 0.5,
    xanchor: "right",
    textangle: -90,
  };
  return [
    { ...where, ...x },
    { ...where, ...y, xshift: -place.labels },
  ];
}

function panelHeading(panel: Panel, at: number, place: PanelPosition): object[] {
  if (panel.title === "") return [];
  return [
    {
      text: `<b>${plotText(panel.title, place.columns, 2)}</b>`,
      xref: `${axisName("x", at)} domain`,
      yref: `${axisName("y", at)} domain`,
      x: 0,
      y: 1,
      xanchor: "left",
      yanchor: "bottom",
      yshift: 5,
      showarrow: false,
      align: "left",
      font: { size: 13, color: theme.text },
    },
  ];
}
