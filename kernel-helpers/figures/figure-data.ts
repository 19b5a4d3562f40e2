import { type Column, type Table, table } from "../tables/index.js";
import { downsample } from "./downsample.js";
import type { Figure, Panel } from "./figure.js";
import type { Layer } from "./layer.js";
import { axisTitle } from "./plot-text.js";
import { positionLabel } from "./position-labels.js";
import { areYears } from "./year-axis.js";

type Drawn = Extract<Layer, { mark: "points" | "line" | "band" | "bars" }>;
type Row = Record<string, unknown>;

/** The data of a figure: one table per panel, one row per position on the horizontal axis, columns by layer. */
export function figureData(figure: Figure): Table[] {
  return figure.panels.map((panel) => panelData(panel, figure.title)).filter((made) => made !== undefined);
}

function panelData(panel: Panel, title: string): Table | undefined {
  const drawn = panel.layers.filter(
    (layer): layer is Drawn => "x" in layer && typeof layer.x === "object" && layer.inLegend !== false,
  );
  if (drawn.length === 0) return undefined;
  const horizontal = drawn.some((layer) => layer.mark === "bars" && layer.horizontal);
  const across = horizontal ? panel.y : panel.x;
  const rows = mergedRows(drawn);
  const grouped = !areYears(rows.map((row) => row["place"]));
  const label = axisTitle(across);
  const place: Column = across.periods
    ? { key: "place", label, kind: "text" }
    : { key: "place", label, kind: "number", digits: 6, grouped };
  const labelled = rows.map((row) => ({
    ...row,
    place: positionLabel(across, row["place"] as number | string),
  }));
  return table({
    title: panel.title === "" ? `Data: ${title}` : panel.title,
    columns: [place, ...drawn.flatMap(layerColumns)],
    rows: across.periods ? labelled : rows,
    notes: drawn.some((layer) => listedPlaces(layer).length < layer.x.length) ? [excerptNote] : [],
    limit: 60,
  });
}

function layerColumns(layer: Drawn, at: number): Column[] {
  const column = (part: string, label: string): Column => ({
    key: `${part}${at}`,
    label,
    kind: "number",
    digits: 5,
  });
  if (layer.mark === "band")
    return [column("lower", `${layer.name}, lower`), column("upper", `${layer.name}, upper`)];
  return [column("value", layer.name)];
}

/** Rows in order of position; a position that occurs twice in a layer gives a second row. */
function mergedRows(drawn: readonly Drawn[]): Row[] {
  const rows = new Map<string, Row>();
  drawn.forEach((layer, at) => {
    const repeats = new Map<unknown, number>();
    const horizontal = layer.mark === "bars" && layer.horizontal;
    const places = horizontal ? layer.y : layer.x;
    for (const i of listedPlaces(layer)) {
      const place = places[i];
      const turn = repeats.get(place) ?? 0;
      repeats.set(place, turn + 1);
      const key = `${turn} ${String(place)}`;
      const row = rows.get(key) ?? { place };
      rows.set(key, Object.assign(row, valuesOf(layer, at, i)));
    }
  });
  const sorted = [...rows.values()];
  return sorted.every((row) => typeof row["place"] === "number")
    ? sorted.sort((a, b) => (a["place"] as number) - (b["place"] as number))
    : sorted;
}

function valuesOf(layer: Drawn, at: number, i: number): Row {
  if (layer.mark === "band") return { [`lower${at}`]: layer.lower[i], [`upper${at}`]: layer.upper[i] };
  const values = layer.mark === "bars" && layer.horizontal ? layer.x : layer.y;
  return { [`value${at}`]: values[i] };
}

const excerptNote =
  "Lines and bands are listed at even steps; long series of points, at the points that are plotted.";

/** Every point, or the plotted ones of a downsampled series; about 24 positions of lines and bands. */
function listedPlaces(layer: Drawn): readonly number[] {
  if (layer.mark === "points") return downsample(layer.x, layer.y)?.kept ?? [...Array(layer.x.length).keys()];
  const last = layer.x.length - 1;
  const step = layer.mark === "bars" ? 1 : Math.max(1, Math.ceil(last / 24));
  return Array.from({ length: Math.floor(last / step) + 1 }, (_, i) => i * step);
}
