import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, expect, test } from "vitest";
import { columnsOf, sourceOf } from "../../kernel-helpers/dataframe/index.js";
import { correct, decisionsLog, undo } from "../../kernel-helpers/functions/corrections.js";
import { observations, readRecord, writeRecord } from "../../kernel-helpers/functions/records.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";

let folder = "";
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "periodwise-corrected-"));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

test("a corrected frame shows raw and corrected values, keeps its source, and can be undone", async () => {
  const read = await readRecord("test/record/fixtures/ferry-loan.csv");
  const checked = correct(read, {
    row: 14,
    column: "payment",
    now: 377,
    why: "35.00 of it was a fee",
    who: "A. K.",
  });
  expect(checked.columns).toEqual(["month", "closing_balance", "payment", "payment (corrected)"]);
  expect(checked.column("payment").values[13]).toBe(412);
  expect(checked.column("payment (corrected)").values[13]).toBe(377);
  expect(sourceOf(checked)).toEqual(sourceOf(read));
  const owed = observations(checked, {
    period: "month",
    step: "month",
    value: "closing_balance",
    inputs: ["payment"],
  });
  expect(owed.groups[0]!.inputs["payment"]![13]).toBe(377);
  expect((await bundleOf(decisionsLog(owed)))?.["text/plain"]).toContain("35.00 of it was a fee");
  const back = undo(checked);
  expect(back.columns).toEqual(read.columns);
  expect(back.values).toEqual(read.values);
});

const why = "sign turned";
const stock = { week: [1, 2, 3, 4], Anzahl: [170, -167, 160, 999] };
const checked = (): ReturnType<typeof correct> =>
  correct(correct(stock, { row: 2, column: "Anzahl", now: 167, why, who: "A. K." }), {
    row: 4,
    why: "another store",
  });

test("an excluded row is marked when the record is shown", async () => {
  expect(checked().column("left out").values).toEqual([false, false, false, true]);
  const shown = (await bundleOf(checked()))?.["text/plain"];
  expect(shown).toMatch(/week +Anzahl +Anzahl \(corrected\) +left out/);
  expect(shown).toMatch(/\b4 +999 +999 +yes/);
  expect(undo(undo(checked())).columns).toEqual(["week", "Anzahl"]);
});

for (const ending of ["csv", "tsv", "json", "parquet", "xlsx", "duckdb"]) {
  test(`a corrected record written as ${ending} is read back with raw values, corrected values and excluded rows`, async () => {
    const path = join(folder, `stock.${ending}`);
    await writeRecord(checked(), path);
    const several = ending === "xlsx" || ending === "duckdb";
    if (several) await expect(readRecord(path)).rejects.toThrow("has several tables");
    const back = await readRecord(path, several ? { table: "record" } : {});
    expect(back.columns).toEqual(["week", "Anzahl", "Anzahl (corrected)", "left out"]);
    expect(back.column("Anzahl").values).toEqual([170, -167, 160, 999]);
    expect(back.column("Anzahl (corrected)").values).toEqual([170, 167, 160, 999]);
    expect(back.column("left out").values.map(String)).toEqual(["false", "false", "false", "true"]);
    expect(sourceOf(back)?.found.join(" ")).toContain('"Anzahl (corrected)" has the corrected ones');
    const value = "Anzahl (corrected)";
    const used = observations(back, { period: "week", step: "week", value, where: { "left out": false } });
    expect(Array.from(Object.values(used.groups[0]!.values)[0]!)).toEqual([170, 167, 160]);
  });
}

for (const ending of ["xlsx", "duckdb"]) {
  test(`the decisions are in a second table of the ${ending} file`, async () => {
    const path = join(folder, `decisions.${ending}`);
    await writeRecord(checked(), path);
    const log = await readRecord(path, { table: "decisions" });
    expect(columnsOf(log).names).toEqual(["row", "column", "was", "now", "why", "who"]);
    expect(log.values.map((row) => (row as unknown[]).map(String))).toEqual([
      ["2", "Anzahl", "-167", "167", why, "A. K."],
      ["4", "whole row", "NaN", "left out", "another store", ""],
    ]);
  });
}

test("a written record that is corrected again keeps all columns separate", async () => {
  const path = join(folder, "again.csv");
  await writeRecord(checked(), path);
  const again = correct(await readRecord(path), { row: 1, column: "Anzahl", now: 171, why: "recount" });
  expect(again.columns.at(-1)).toBe("Anzahl (corrected) (2)");
  expect(again.column("Anzahl (corrected) (2)").values).toEqual([171, -167, 160, 999]);
});

test("a duplicate row resolved by an option is not marked as corrected", async () => {
  const counted = { week: [1, 2, 2, 3], stock: [9, 8, 6, 5] };
  const options = { period: "week", step: "week", value: "stock", duplicates: "average" } as const;
  const text = (await bundleOf(observations(counted, options)))?.["text/plain"];
  expect(text).toContain("0 corrected, 1 settled by an option, ");
  const byHand = correct(counted, { row: 4, column: "stock", now: 4, why: "recount" });
  const both = (await bundleOf(observations(byHand, options)))?.["text/plain"];
  expect(both).toContain("1 corrected, 1 settled by an option, ");
});
