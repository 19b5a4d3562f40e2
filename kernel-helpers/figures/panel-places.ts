import type { Panel } from "./figure.js";
import { axisName, type PlotTrace } from "./plot-traces.js";

/** Where one panel stands: shares of the plot's width and height, and how many letters its axis titles hold. */
export interface PanelPlace {
  readonly x: readonly [number, number];
  readonly y: readonly [number, number];
  readonly columns: number;
  readonly rows: number;
  /** Pixels that the labels of the upright axis take. */
  readonly labels: number;
}

/** The places of all panels, and the pixels around them. */
export interface PanelPlaces {
  readonly panels: readonly PanelPlace[];
  readonly height: number;
  readonly margin: {
    readonly l: number;
    readonly r: number;
    readonly t: number;
    readonly b: number;
    readonly pad: number;
  };
  /** Lower edge of the legend, as a share of the plot's height. */
  readonly legend: number;
}

const letter = 7.8;
const narrow = 560;

/** Lays panels out in one column on a narrow screen, else in two (three when there are many). */
export function panelPlaces(
  shown: readonly Panel[],
  width: number,
  title: number,
  data: readonly PlotTrace[],
): PanelPlaces {
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

/** Pixels for the longest label of an upright axis: names as they are, numbers by the digits that ticks need. */
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

/** Height of a legend that stands above the panels and breaks into rows of equal columns. */
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

/** Letters of a label, its numbered signs counted as one. */
function shownLength(label: string): number {
  return label.replace(/&#\d+;/g, "?").length;
}
