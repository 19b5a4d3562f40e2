import { type Table, table } from "../tables/index.js";
import { type Axis, type Figure, figure } from "./figure.js";
import type { Layer } from "./layer.js";
import { axisTitle } from "./plot-text.js";
import { positionLabel } from "./position-labels.js";
import { type LineSeries, recordedStyle } from "./recorded-series.js";
import type { SmallMultiplesOptions, SmallSeries } from "./small-multiples.js";
import { areYears } from "./year-axis.js";

/** Smallest and largest value on an axis. */
export type Ends = readonly [number, number];
type Both = { readonly x: Ends; readonly y: Ends };

/** All series in one panel as a grid of frames, which draws as fast for a hundred series as for one. */
export function framedMultiples(
  { title, x, y, series, notes = [] }: SmallMultiplesOptions,
  ends: Both,
): Figure {
  const across = Math.ceil(Math.sqrt(1.6 * series.length));
  const down = Math.ceil(series.length / across);
  const placed = series.map((each, i) => ({
    ...each,
    column: i % across,
    row: down - 1 - Math.floor(i / across),
  }));
  const recorded = placed.map((each) => inFrame(each.recorded, each, ends));
  const fitted = placed.flatMap((each) => (each.fitted ? [inFrame(each.fitted, each, ends)] : []));
  const floors = placed.map(({ column, row }) => ({
    x: [column + 0.06, column + 0.94],
    y: [row + 0.06, row + 0.06],
  }));
  const layers: Layer[] = [
    { mark: "line", name: "frame", ...together(floors), style: 4, inLegend: false, thin: true },
    ...(fitted.length > 0 ? [{ mark: "line", name: "fitted", ...together(fitted), style: 0 } as const] : []),
    { mark: "points", name: "recorded", ...together(recorded), style: recordedStyle, small: true },
    ...placed.map(
      ({ name, column, row }): Layer => ({ mark: "label", name, x: column + 0.06, y: row + 0.98 }),
    ),
  ];
  const range = (axis: Axis, [least, greatest]: Ends): string =>
    `${axisTitle(axis)} from ${positionLabel(axis, least)} to ${positionLabel(axis, greatest)}`;
  const scale = `Axes of every frame: ${range(x, ends.x)} (horizontal), ${range(y, ends.y)} (vertical).`;
  const bare = { bare: true } as const;
  const panel = {
    title: "",
    layers,
    x: { ...x, ...bare, ends: [0, across] },
    y: { ...y, ...bare, ends: [0, down] },
  } as const;
  return figure({
    title,
    panels: [panel],
    notes: [scale, ...notes],
    numbers: [seriesTable(title, x, y, series)],
  });
}

/** A series scaled into its frame. */
function inFrame(
  line: LineSeries,
  at: { column: number; row: number },
  ends: Both,
): { x: number[]; y: number[] } {
  const share = (value: unknown, [least, greatest]: Ends): number =>
    (Number(value) - least) / (greatest - least);
  return {
    x: Array.from({ length: line.x.length }, (_, i) => at.column + 0.06 + 0.88 * share(line.x[i], ends.x)),
    y: Array.from({ length: line.y.length }, (_, i) => at.row + 0.08 + 0.7 * share(line.y[i], ends.y)),
  };
}

/** Several lines as one, with a gap after each. */
function together(lines: readonly { x: number[]; y: number[] }[]): { x: number[]; y: number[] } {
  return {
    x: lines.flatMap((line) => [...line.x, Number.NaN]),
    y: lines.flatMap((line) => [...line.y, Number.NaN]),
  };
}

function seriesTable(title: string, x: Axis, y: Axis, series: readonly SmallSeries[]): Table {
  const grouped = !series.every(({ recorded }) => areYears(Array.from<unknown>(recorded.x)));
  return table({
    title: `Data: ${title}`,
    columns: [
      { key: "name", label: "Series", kind: "text" },
      x.periods
        ? { key: "x", label: axisTitle(x), kind: "text" }
        : { key: "x", label: axisTitle(x), kind: "number", digits: 6, grouped },
      { key: "recorded", label: axisTitle(y), kind: "number", digits: 5 },
    ],
    rows: series.flatMap(({ name, recorded }) =>
      Array.from({ length: recorded.x.length }, (_, i) => ({
        name,
        x: x.periods ? positionLabel(x, recorded.x[i]!) : recorded.x[i],
        recorded: recorded.y[i],
      })),
    ),
    limit: 60,
  });
}
