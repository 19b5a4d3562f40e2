import { type Column, type Table, table } from "../tables/index.js";
import type { Figure, Panel } from "./figure.js";
import type { Layer } from "./layer.js";
import { placeText } from "./period-places.js";
import { axisTitle } from "./plot-text.js";
import { thinned } from "./thinned.js";
import { yearLike } from "./year-like.js";

type Drawn = Extract<Layer, { mark: "points" | "line" | "band" | "bars" }>;
type Row = Record<string, unknown>;

/** The numbers behind a figure: a table a panel, a row a place on the horizontal axis, columns by layer. */
export function numbersBehind(figure: Figure): Table[] {
  return figure.panels.map((panel) => panelNumbers(panel, figure.title)).filter((made) => made !== undefined);
}

function panelNumbers(panel: Panel, title: string): Table | undefined {
  const drawn = panel.layers.filter(
    (layer): layer is Drawn => "x" in layer && typeof layer.x === "object" && layer.inLegend !== false,
  );
  if (drawn.length === 0) return undefined;
  const lying = drawn.some((layer) => layer.mark === "bars" && layer.lying);
  const across = lying ? panel.y : panel.x;
  const rows = mergedRows(drawn);
  const grouped = !yearLike(rows.map((row) => row["place"]));
  const label = axisTitle(across);
  const place: Column = across.periods
    ? { key: "place", label, kind: "text" }
    : { key: "place", label, kind: "number", digits: 6, grouped };
  const named = rows.map((row) => ({ ...row, place: placeText(across, row["place"] as number | string) }));
  return table({
    title: panel.title === "" ? `Numbers behind: ${title}` : panel.title,
    columns: [place, ...drawn.flatMap(layerColumns)],
    rows: across.periods ? named : rows,
    notes: drawn.some((layer) => listedPlaces(layer).length < layer.x.length) ? [partly] : [],
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

/** Rows by place in order; a place that a layer holds twice gives a second row. */
function mergedRows(drawn: readonly Drawn[]): Row[] {
  const rows = new Map<string, Row>();
  drawn.forEach((layer, at) => {
    const repeats = new Map<unknown, number>();
    const lying = layer.mark === "bars" && layer.lying;
    const places = lying ? layer.y : layer.x;
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
  const values = layer.mark === "bars" && layer.lying ? layer.x : layer.y;
  return { [`value${at}`]: values[i] };
}

const partly =
  "Of lines and bands, places at even steps are listed; of very many points, those that are drawn.";

/** Every point, but of a thinned series those that are drawn; of lines and bands, which are drawn finely, about 24. */
function listedPlaces(layer: Drawn): readonly number[] {
  if (layer.mark === "points") return thinned(layer.x, layer.y)?.kept ?? [...Array(layer.x.length).keys()];
  const last = layer.x.length - 1;
  const step = layer.mark === "bars" ? 1 : Math.max(1, Math.ceil(last / 24));
  return Array.from({ length: Math.floor(last / step) + 1 }, (_, i) => i * step);
}
