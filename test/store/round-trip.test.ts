import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import fc from "fast-check";
import { afterAll, beforeAll, expect, test } from "vitest";
import type { ColumnTable } from "../../src/record/index.js";
import { readTable, writeTables } from "../../src/store/index.js";

let folder = "";
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "periodwise-round-"));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

// Letters first, so that a text is no number, date or code: a text file does not say which it is.
const word = fc
  .tuple(fc.constantFrom("a", "Ferry ", "é", "<b>", "=", "x,", 'y"', "z\n", "q;"), fc.string())
  .map(([head, tail]) => `${head}${tail.replaceAll(/[^\P{C}]/gu, "")}w`);
const name = fc
  .string({ minLength: 1, maxLength: 12 })
  .map((text) => `n${text.replaceAll(/[^\P{C}]/gu, "")}o`);

/** Tables with columns of numbers (every finite double) or of text, cells missing here and there. */
const tables = fc.integer({ min: 1, max: 12 }).chain((rows) => {
  const numbers = fc
    .array(
      fc.oneof(fc.double({ noNaN: true, noDefaultInfinity: true }), fc.integer(), fc.constant(Number.NaN)),
      { minLength: rows, maxLength: rows },
    )
    .map((cells) => Float64Array.from(cells));
  const texts = fc.array(fc.oneof({ weight: 6, arbitrary: word }, fc.constant(null)), {
    minLength: rows,
    maxLength: rows,
  });
  const key = fc.constant(Float64Array.from({ length: rows }, (_, i) => i));
  return fc
    .tuple(
      key,
      fc.array(fc.oneof(numbers, texts), { minLength: 1, maxLength: 4 }),
      fc.uniqueArray(name, { minLength: 5, maxLength: 5, selector: (text) => text.trim().toLowerCase() }),
    )
    .map(
      ([first, rest, names]): ColumnTable => ({
        names: names.slice(0, rest.length + 1),
        columns: [first, ...rest],
      }),
    );
});

/** Cells as plain arrays; a column without any value cannot say what it would hold, so it is all null. */
function cells(table: ColumnTable): unknown {
  return table.columns.map((column) => {
    const plain = Array.from<unknown>(column).map((cell) => (Number.isNaN(cell) ? null : cell));
    return plain;
  });
}

for (const ending of ["csv", "tsv", "json", "parquet", "xlsx", "duckdb"]) {
  test(`any table written as ${ending} is read back the same`, async () => {
    let files = 0;
    await fc.assert(
      fc.asyncProperty(tables, async (table) => {
        const path = join(folder, `table-${files++}.${ending}`);
        await writeTables([{ name: "record", table }], path);
        const back = await readTable(path);
        expect(back.names).toEqual(table.names.map((text) => text.trim()));
        expect(cells(back)).toEqual(cells(table));
      }),
      { seed: 20260401, numRuns: ending === "duckdb" ? 15 : 60 },
    );
  });
}
