import type { DataFrame } from "danfojs-node";
import { type Bundle, bundleOf, type Column, table } from "../tables/index.js";
import { plural } from "../wording/index.js";
import { danfo } from "./danfo.js";
import { frameNotes } from "./frame-notes.js";

const shows: unique symbol = Symbol.for("mime-bundle") as never;

interface SeriesLike {
  readonly values: readonly unknown[];
  readonly columns: readonly string[];
  readonly index: readonly (string | number)[];
}

/** Lets every danfo frame and series display itself as a table. */
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

/** Maximum number of rows shown; a note gives the number of all rows. */
const shownRows = 40;

async function frameBundle(frame: DataFrame): Promise<Bundle> {
  const { source, names } = frameNotes(frame);
  const labels = names ?? frame.columns;
  const rows = frame.values as unknown[][];
  const notes = [`${plural(rows.length, "row")}, ${plural(labels.length, "column")}${cut(rows.length)}.`];
  if (source !== undefined)
    notes.push(...source.found, `SHA-256 ${source.checksum}, ${plural(source.bytes, "byte")}.`);
  return bundleOfRows(source?.path ?? "DataFrame", labels, rows, frame.index, notes);
}

async function seriesBundle(series: SeriesLike): Promise<Bundle> {
  const rows = series.values.map((value) => [value]);
  const notes = [`${plural(rows.length, "row")}${cut(rows.length)}.`];
  return bundleOfRows("Series", [String(series.columns[0])], rows, series.index, notes);
}

function cut(rows: number): string {
  return rows > shownRows ? `; the first ${shownRows} are shown` : "";
}

/** All digits, without grouping: a record is shown as it is. The index is shown unless it only counts rows. */
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
