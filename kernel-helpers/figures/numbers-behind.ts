import { type Column, type Table, table } from "../tables/index.js";
import type { Figure, Panel } from "./figure.js";
import type { Layer } from "./layer.js";
import { axisTitle } from "./plot-text.js";

type Drawn = Extract<Layer, { mark: "points" | "line" | "band" | "bars" }>;
type Row = Record<string, unknown>;

/** The numbers behind a figure: a table a panel, a row a place on the horizontal axis, columns by layer. */
export function numbersBehind(figure: Figure): Table[] {
  return figure.panels.map((panel) => panelNumbers(panel, figure.title)).filter((made) => made !== undefined);
}

function panelNumbers(panel: Panel, title: string): Table | undefined {
  const drawn = panel.layers.filter((layer): layer is Drawn => "x" in layer && typeof layer.x === "object");
  if (drawn.length === 0) return undefined;
  const lying = drawn.some((layer) => layer.mark === "bars" && layer.lying);
  const across = lying ? panel.y : panel.x;
  const place: Column = { key: "place", label: axisTitle(across), kind: "number", digits: 6 };
  return table({
    title: panel.title === "" ? `Numbers behind: ${title}` : panel.title,
    columns: [place, ...drawn.flatMap(layerColumns)],
    rows: mergedRows(drawn),
    notes: drawn.some((layer) => every(layer) > 1)
      ? ["Of lines and bands, places at even steps are listed."]
      : [],
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
    const step = every(layer);
    for (let i = 0; i < places.length; i += step) {
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

/** Lines and bands are drawn finely; of one with many places every so manieth is listed. */
function every(layer: Drawn): number {
  return layer.mark === "line" || layer.mark === "band"
    ? Math.max(1, Math.ceil((layer.x.length - 1) / 24))
    : 1;
}
