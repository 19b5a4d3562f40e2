import { figure, resetPlotLibrary } from "../../kernel-helpers/figures/index.js";
import { type Bundle, bundleOf, type Table, table } from "../../kernel-helpers/tables/index.js";
import { figuresOfEveryKind } from "../figures/all-kinds.js";

/** Text that would do harm or break the page if it were taken for anything but text. */
export const hostile = `<img src=x onerror=alert(1)></script><!-- $x$ "' & \u202eabc שלום 🐟 ${"averylongname".repeat(6)}`;

const week = [0, 1, 2, 3];

/** A table of every kind of column, one too long, one with hostile texts. */
export const tablesOfEveryKind: Readonly<Record<string, Table>> = {
  "every column": table({
    title: "Every kind of column",
    columns: [
      { key: "text", label: "Parameter", kind: "text" },
      { key: "integer", label: "Week", kind: "integer" },
      { key: "number", label: "Level", unit: "10^4 cells/mL", kind: "number" },
      { key: "estimate", label: "Estimate", unit: "per h", kind: "estimate", pairedWith: "error" },
      { key: "error", label: "Standard error", kind: "estimate" },
      { key: "money", label: "Owed", kind: "money", unit: "EUR" },
      { key: "percent", label: "Share", kind: "percent" },
      { key: "probability", label: "Probability", kind: "probability", pairedWith: "carlo" },
    ],
    rows: [
      {
        text: "r",
        integer: 1,
        number: 13.9,
        estimate: 0.54415,
        error: 0.006127,
        money: 129346n,
        percent: 0.042,
        probability: 0.5443,
        carlo: 0.001,
      },
      {
        text: "K",
        integer: 2,
        number: -107.2,
        estimate: 1.5199,
        error: "not determined",
        money: -500n,
        percent: 0.5,
        probability: 0.0001,
        carlo: 0.001,
      },
    ],
    totals: [{ text: "Sum", money: 128846n }],
    notes: ["Profile intervals.", { text: "a flat profile", column: "error", row: 1 }],
  }),
  long: table({
    title: "A thousand weeks",
    columns: [{ key: "n", label: "Week", kind: "integer" }],
    rows: Array.from({ length: 1000 }, (_, n) => ({ n })),
    limit: 12,
  }),
  hostile: table({
    title: hostile,
    columns: [
      { key: "a", label: hostile, unit: hostile, kind: "text" },
      ...Array.from({ length: 12 }, (_, i) => ({
        key: `b${i}`,
        label: `Column ${i}`,
        kind: "number" as const,
      })),
    ],
    rows: [{ a: hostile, b0: 1 }],
    notes: [hostile],
  }),
};

const hostileFigure = figure({
  title: hostile,
  x: { title: hostile, unit: "h" },
  y: { title: "Level", unit: hostile },
  layers: [
    { mark: "line", name: hostile, x: week, y: [1, 3, 2, 4] },
    { mark: "points", name: "counted", x: week, y: [1, 2, 3, 4] },
    { mark: "threshold", name: hostile, y: 2 },
    { mark: "vertical", name: hostile, x: 1 },
  ],
  notes: [hostile],
});

/** How many figures a gallery holds. */
export const figureCount: number = Object.keys(figuresOfEveryKind).length + 1;

/** A notebook that has every kind of figure and table; two figures stand in one output, as fits show them. */
export async function galleryNotebook(): Promise<{ cells: object[] } & Record<string, unknown>> {
  resetPlotLibrary();
  const shown: Bundle[] = [];
  for (const each of [
    ...Object.values(figuresOfEveryKind),
    hostileFigure,
    ...Object.values(tablesOfEveryKind),
  ]) {
    shown.push((await bundleOf(each)) as Bundle);
  }
  const [first, second, ...rest] = shown as [Bundle, Bundle, ...Bundle[]];
  const together = {
    "text/html": `${first["text/html"]}\n${second["text/html"]}`,
    "text/plain": `${first["text/plain"]}\n\n${second["text/plain"]}`,
  };
  return {
    nbformat: 4,
    nbformat_minor: 5,
    metadata: {
      kernelspec: { name: "python3", display_name: "Python 3", language: "python" },
      language_info: { name: "typescript" },
    },
    cells: [
      {
        cell_type: "markdown",
        id: "head",
        metadata: {},
        source: "# Everything that is shown\n\nInvented numbers of the hatchery.",
      },
      ...[together, ...rest].map((data, i) => ({
        cell_type: "code",
        id: `cell-${i}`,
        metadata: {},
        source: `shown[${i}]`,
        execution_count: i + 1,
        outputs: [{ output_type: "display_data", metadata: {}, data }],
      })),
    ],
  };
}
