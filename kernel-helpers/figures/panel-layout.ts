import type { Panel } from "./figure.js";
import { axisName, type PlotTrace } from "./plot-traces.js";

/** Position of one panel as fractions of the plot, and the number of characters that its axis titles can have. */
export interface PanelPosition {
  readonly x: readonly [number, number];
  readonly y: readonly [number, number];
  readonly columns: number;
  readonly rows: number;
  /** Width of the labels of the vertical axis, in pixels. */
  readonly labels: number;
}

/** Positions of all panels, and margins in pixels. */
export interface PanelLayout {
  readonly panels: readonly PanelPosition[];
  readonly height: number;
  readonly margin: {
    readonly l: number;
    readonly r: number;
    readonly t: number;
    readonly b: number;
    readonly pad: number;
  };
  /** Lower edge of the legend, as a fraction of the plot height. */
  readonly legend: number;
}

const letter = 7.8;
const narrow = 560;

/** One column of panels on a narrow screen, otherwise two (three when there are many). */
export function panelLayout(
  shown: readonly Panel[],
  width: number,
  title: number,
  data: readonly PlotTrace[],
): PanelLayout {
  const count = shown.length;
  const across = count === 1 || width < narrow ? 1 : count > 6 ? 3 : 2;
  const down = Math.ceil(count / across);
  const each = count === 1 ? (width < narrow ? 300 : 340) : 230;
  const labels = shown.map((_, at) => labelWidth(data, at));
  const left = Math.max(...labels) + 34;
  const top = title + legendHeight(data, width - left - 18) + (count > 1 ? 30 : 10);
  const margin = { l: left, r: 18, t: top, b: 60, pad: 0 };
  const gapX = left + 10;
  const gapY = 92;
  const plotWidth = width - margin.l - margin.r;
  const plotHeight = down * each + (down - 1) * gapY;
  const panelWidth = (plotWidth - (across - 1) * gapX) / across;
  const panels = shown.map((_, at) => {
    const start = (at % across) * (panelWidth + gapX);
    const above = Math.floor(at / across) * (each + gapY);
    return {
      x: [start / plotWidth, (start + panelWidth) / plotWidth] as const,
      y: [1 - (above + each) / plotHeight, 1 - above / plotHeight] as const,
      columns: Math.floor((panelWidth + 20) / letter),
      rows: Math.floor(each / letter),
      labels: labels[at] ?? 40,
    };
  });
  return {
    panels,
    height: margin.t + plotHeight + margin.b,
    margin,
    legend: 1 + (count > 1 ? 28 : 4) / plotHeight,
  };
}

/** Width in pixels of the longest label of a vertical axis: names, or the digits of its ticks. */
function labelWidth(data: readonly PlotTrace[], at: number): number {
  const values = data
    .filter((trace) => trace["yaxis"] === axisName("y", at))
    .flatMap((trace) => trace["y"] as unknown[]);
  const names = values.filter((value) => typeof value === "string").flatMap((name) => name.split("<br>"));
  if (names.length > 0) return Math.min(190, Math.max(...names.map(shownLength)) * letter + 16);
  const sizes = values.filter((value) => typeof value === "number").map(Math.abs);
  const greatest = sizes.reduce((most, size) => Math.max(most, size), 0);
  return greatest >= 1e5 || (greatest > 0 && greatest < 0.01) ? 64 : 46;
}

/** Height of the legend above the panels, which wraps into rows of equal columns. */
function legendHeight(data: readonly PlotTrace[], width: number): number {
  const names = data
    .filter((trace) => trace["showlegend"])
    .map((trace) => String(trace["name"]).split("<br>"));
  if (names.length < 2) return 0;
  const sizes = names.map((lines) => Math.max(...lines.map(shownLength)) * letter + 48);
  const total = sizes.reduce((sum, size) => sum + size, 0);
  const rows =
    total <= width ? 1 : Math.ceil(names.length / Math.max(1, Math.floor(width / Math.max(...sizes))));
  return rows * 20 * Math.max(...names.map((lines) => lines.length)) + 8;
}

/** Characters of a label, with character references counted as one. */
function shownLength(label: string): number {
  return label.replace(/&#\d+;/g, "?").length;
}
