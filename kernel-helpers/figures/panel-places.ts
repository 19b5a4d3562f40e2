import type { PlotTrace } from "./plot-traces.js";

/** Where one panel stands: shares of the plot's width and height, and how many letters its axis titles hold. */
export interface PanelPlace {
  readonly x: readonly [number, number];
  readonly y: readonly [number, number];
  readonly columns: number;
  readonly rows: number;
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
  readonly legend: Readonly<Record<string, unknown>>;
}

const letter = 7.4;
const narrow = 560;

/** Lays panels out in one column on a narrow screen, else in two (three when there are many). */
export function panelPlaces(
  count: number,
  width: number,
  title: number,
  data: readonly PlotTrace[],
): PanelPlaces {
  const across = count === 1 || width < narrow ? 1 : count > 6 ? 3 : 2;
  const down = Math.ceil(count / across);
  const each = count === 1 ? (width < narrow ? 300 : 340) : 230;
  const gapX = 78;
  const gapY = 88;
  const margin = {
    l: 68,
    r: 18,
    t: title + legendHeight(data, width - 86) + (count > 1 ? 30 : 10),
    b: 60,
    pad: 0,
  };
  const plotWidth = width - margin.l - margin.r;
  const plotHeight = down * each + (down - 1) * gapY;
  const panelWidth = (plotWidth - (across - 1) * gapX) / across;
  const panels = Array.from({ length: count }, (_, at) => {
    const left = (at % across) * (panelWidth + gapX);
    const top = Math.floor(at / across) * (each + gapY);
    return {
      x: [left / plotWidth, (left + panelWidth) / plotWidth] as const,
      y: [1 - (top + each) / plotHeight, 1 - top / plotHeight] as const,
      columns: Math.floor((panelWidth + gapX / 2) / letter),
      rows: Math.floor(each / letter),
    };
  });
  const legend = count > 1 ? { y: 1 + 30 / plotHeight } : { y: 1 + 4 / plotHeight };
  return { panels, height: margin.t + plotHeight + margin.b, margin, legend };
}

/** Height of a legend that stands above the panels and breaks into rows of equal columns. */
function legendHeight(data: readonly PlotTrace[], width: number): number {
  const names = data.filter((trace) => trace["showlegend"]).map((trace) => String(trace["name"]));
  if (names.length < 2) return 0;
  const widest = Math.max(...names.map((name) => name.length)) * letter + 48;
  const total = names.reduce((sum, name) => sum + name.length * letter + 48, 0);
  const rows = total <= width ? 1 : Math.ceil(names.length / Math.max(1, Math.floor(width / widest)));
  return rows * 20 + 8;
}
