import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, expect, test } from "vitest";
import { tableOf } from "../../src/record/index.js";
import { type StreamOptions, streamSeries, writeTables } from "../../src/store/index.js";

let folder = "";
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "periodwise-stream-"));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

// Series mixed, out of order and longer than one piece of the engine (2,048 rows).
const rows = Array.from({ length: 9000 }, (_, i) => ({
  item: `item ${(i * 7) % 3}`,
  week: Math.floor(i / 3),
  stock: i % 11 === 0 ? null : i / 8,
}));
const table = tableOf({
  item: rows.map((row) => row.item),
  week: rows.map((row) => row.week),
  stock: rows.map((row) => row.stock),
});

async function all(path: string, options: StreamOptions) {
  const found = [];
  for await (const { name, table: own, rows: places } of streamSeries(path, options))
    found.push({
      name,
      weeks: Array.from(own.columns[1]!),
      stock: Array.from(own.columns[2]!),
      places: Array.from(places),
    });
  return found;
}

const expected = [0, 1, 2].map((n) => {
  const own = rows.map((row, i) => ({ ...row, place: i + 1 })).filter(({ item }) => item === `item ${n}`);
  return {
    name: `item ${n}`,
    weeks: own.map(({ week }) => week),
    stock: own.map(({ stock }) => stock ?? Number.NaN),
    places: own.map(({ place }) => place),
  };
});

for (const ending of ["csv", "parquet", "duckdb"]) {
  test(`a ${ending} file is streamed series by series, in the order of its rows`, async () => {
    const path = join(folder, `mixed.${ending}`);
    await writeTables([{ name: "record", table }], path);
    expect(await all(path, { by: "item" })).toEqual(expected);
  });
}

test("files that have to be read cell by cell, and missing columns, are rejected", async () => {
  const path = join(folder, "comma.csv");
  writeFileSync(path, "item;week;stock\na;1;1,5\n");
  await expect(all(path, { by: "item" })).rejects.toThrow("cannot be streamed by series");
  writeFileSync(path, "item,week,stock\na,1,1.5\n");
  await expect(all(path, { by: "itm" })).rejects.toThrow(
    'The file has no column "itm". It has "item", "week" and "stock". Did you mean "item"?',
  );
});
