import { tableOfRows } from "../../src/record/index.js";
import type { NamedTable } from "../../src/store/index.js";

type Plain = Readonly<Record<string, unknown>>;

/** Columns that a part of a result inherits. */
interface Inherited {
  readonly scalars: Plain;
  readonly series: Readonly<Record<string, ArrayLike<unknown>>>;
}

/** Parts that are results themselves, with tables of their own. */
const separateKinds = new Set(["observations", "rule", "fit", "forecast", "period-axis"]);

/**
 * The tables of any result: its single values as "summary", and every list as a table of the same name, with one row per
 * item (or per element of its series) and the inherited values beside it.
 */
export function resultTables(result: object): readonly NamedTable[] {
  const rows = new Map<string, object[]>();
  collect(result as Plain, "summary", { scalars: {}, series: {} }, rows);
  return Array.from(rows, ([name, own]) => ({ name, table: tableOfRows(own) }));
}

function collect(part: Plain, name: string, inherited: Inherited, rows: Map<string, object[]>): void {
  const scalars = { ...inherited.scalars, ...scalarsOf(part, "") };
  const own = seriesOf(part);
  const length = Math.max(0, ...Object.values(own).map((series) => series.length));
  const series = ofLength({ ...inherited.series, ...own }, length);
  const hasNewScalars = Object.keys(scalars).length > Object.keys(inherited.scalars).length;
  if (length > 0)
    add(
      rows,
      name,
      Array.from({ length }, (_, i) => ({ ...scalars, ...at(series, i) })),
    );
  else if (hasNewScalars) add(rows, name, [scalars]);
  for (const [child, items] of Object.entries(part)) {
    if (isListOfTexts(items))
      add(
        rows,
        child,
        items.map((text) => ({ ...scalars, [child]: text })),
      );
    else if (isListOfParts(items)) for (const item of items) collect(item, child, { scalars, series }, rows);
  }
}

function add(rows: Map<string, object[]>, name: string, more: readonly object[]): void {
  rows.set(name, [...(rows.get(name) ?? []), ...more]);
}

function isScalar(value: unknown): boolean {
  return ["number", "string", "boolean", "bigint"].includes(typeof value) || value === null;
}

function isPart(value: unknown): value is Plain {
  if (typeof value !== "object" || value === null || Array.isArray(value) || ArrayBuffer.isView(value))
    return false;
  return !separateKinds.has(String((value as Plain)["kind"]));
}

function isListOfParts(value: unknown): value is readonly Plain[] {
  return Array.isArray(value) && value.length > 0 && value.every(isPart);
}

function isListOfTexts(value: unknown): value is readonly string[] {
  return Array.isArray(value) && value.length > 0 && value.every((item) => typeof item === "string");
}

/** Single values; those of a nested part are named "part.name". */
function scalarsOf(part: Plain, prefix: string): Plain {
  const own: Record<string, unknown> = {};
  for (const [name, value] of Object.entries(part)) {
    if (isScalar(value) && (name !== "kind" || prefix !== ""))
      own[`${prefix}${name}`] = typeof value === "bigint" ? String(value) : value;
    else if (isPart(value) && prefix === "") Object.assign(own, scalarsOf(value, `${name}.`));
  }
  return own;
}

function seriesOf(part: Plain): Record<string, ArrayLike<unknown>> {
  const isSeries = (value: unknown): value is ArrayLike<unknown> =>
    (ArrayBuffer.isView(value) && !(value instanceof DataView)) ||
    (Array.isArray(value) && value.length > 0 && value.every((item) => typeof item === "number"));
  return Object.fromEntries(
    Object.entries(part).filter((entry): entry is [string, ArrayLike<unknown>] => isSeries(entry[1])),
  );
}

function ofLength(
  series: Readonly<Record<string, ArrayLike<unknown>>>,
  length: number,
): Record<string, ArrayLike<unknown>> {
  return Object.fromEntries(Object.entries(series).filter(([, values]) => values.length === length));
}

function at(series: Readonly<Record<string, ArrayLike<unknown>>>, i: number): Plain {
  return Object.fromEntries(Object.entries(series).map(([name, values]) => [name, values[i]]));
}
