import type { DataFrame } from "danfojs-node";
import { type Bundle, bundleOf, type Column, table } from "../tables/index.js";
import { danfo } from "./danfo.js";
import { notesOf } from "./frame-notes.js";

const shows: unique symbol = Symbol.for("mime-bundle") as never;

interface SeriesLike {
  readonly values: readonly unknown[];
  readonly columns: readonly string[];
  readonly index: readonly (string | number)[];
}

/** Lets every frame and series of danfo show itself as a table, those of a cell's own making too. */
export function showFrames(): void {
  const { DataFrame, Series } = danfo();
  if (Object.hasOwn(DataFrame.prototype, shows)) return;
  Object.defineProperty(DataFrame.prototype, shows, {
    value(this: DataFrame) {
      return frameBundle(this);
    },
  });
  Object.defineProperty(Series.prototype, shows, {
    value(this: SeriesLike) {
      return seriesBundle(this);
    },
  });
}

/** Rows of a long frame that are shown; the note says how many there are. */
const shownRows = 40;

async function frameBundle(frame: DataFrame): Promise<Bundle> {
  const { source, names } = notesOf(frame);
  const labels = names ?? frame.columns;
  const rows = frame.values as unknown[][];
  const notes = [`${rows.length} rows, ${labels.length} columns${cut(rows.length)}.`];
  if (source !== undefined) notes.push(...source.found, `SHA-256 ${source.checksum}, ${source.bytes} bytes.`);
  return bundleOfRows(source?.path ?? "DataFrame", labels, rows, frame.index, notes);
}

async function seriesBundle(series: SeriesLike): Promise<Bundle> {
  const rows = series.values.map((value) => [value]);
  const notes = [`${rows.length} rows${cut(rows.length)}.`];
  return bundleOfRows("Series", [String(series.columns[0])], rows, series.index, notes);
}

function cut(rows: number): string {
  return rows > shownRows ? `; the first ${shownRows} are shown` : "";
}

/** Every digit is shown and none grouped: a record is shown as it is. The index comes first where it says more than the place. */
async function bundleOfRows(
  title: string,
  names: readonly string[],
  all: readonly (readonly unknown[])[],
  index: readonly (string | number)[],
  notes: readonly string[],
): Promise<Bundle> {
  if (names.length === 0) return { "text/plain": `${title}: no columns` };
  const rows = all.slice(0, shownRows);
  const labelled = index.some((label, i) => label !== i);
  const columns: Column[] = names.map((label, i) => ({
    key: `c${i}`,
    label,
    kind: kindOf(rows, i),
    digits: 15,
  }));
  const made = table({
    title,
    columns: labelled ? [{ key: "index", label: "", kind: "text" }, ...columns] : columns,
    rows: rows.map((row, r) => ({
      index: String(index[r]),
      ...Object.fromEntries(row.map((cell, i) => [`c${i}`, cell])),
    })),
    notes,
    format: { group: "" },
  });
  return (await bundleOf(made)) ?? { "text/plain": title };
}

function kindOf(rows: readonly (readonly unknown[])[], at: number): "text" | "number" {
  const cells = rows.map((row) => row[at]).filter((cell) => cell !== null && cell !== undefined);
  return cells.length > 0 && cells.every((cell) => typeof cell === "number") ? "number" : "text";
}
