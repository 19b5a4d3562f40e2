import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as workbooks from "xlsx";
import { tableOf } from "../../src/record/index.js";
import { type ReadOptions, readTable, writeTables } from "../../src/store/index.js";

let folder = "";
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "periodwise-lies-"));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const at = (name: string): string => join(folder, name);
const record = { name: "record", table: tableOf({ week: [1, 2], item: ["rope", "tar"] }) };

async function readError(name: string, options?: ReadOptions): Promise<string> {
  const thrown = await readTable(at(name), options).then(
    () => ({ code: "no error", message: "" }),
    (error: unknown) => error as { code: string; message: string },
  );
  return `${thrown.code}: ${thrown.message.replaceAll(folder, "")}`;
}

async function columns(name: string, options?: ReadOptions): Promise<Record<string, unknown[]>> {
  const table = await readTable(at(name), options);
  return Object.fromEntries(table.names.map((column, i) => [column, Array.from<unknown>(table.columns[i]!)]));
}

function workbook(name: string, sheets: Record<string, workbooks.WorkSheet>): void {
  const book = workbooks.utils.book_new();
  for (const [title, sheet] of Object.entries(sheets)) workbooks.utils.book_append_sheet(book, sheet, title);
  writeFileSync(at(name), workbooks.write(book, { type: "buffer", bookType: "xlsx" }) as Buffer);
}

describe("a wrong file extension", () => {
  test("is ignored when the contents show the format, and a note says so", async () => {
    await writeTables([record], at("record.parquet"));
    await writeTables([record], at("record.xlsx"));
    for (const [from, format] of [
      ["record.parquet", "parquet"],
      ["record.xlsx", "excel"],
    ] as const) {
      writeFileSync(at("lie.csv"), readFileSync(at(from)));
      const table = await readTable(at("lie.csv"));
      expect(Array.from(table.columns[0]!)).toEqual([1, 2]);
      expect(table.source.found[0]).toBe(
        `The file is read as ${format}: its contents do not match its extension.`,
      );
    }
  });

  test("is rejected when a text file is named as a workbook, Parquet or a database", async () => {
    for (const ending of ["xlsx", "parquet", "duckdb"]) {
      writeFileSync(at(`text.${ending}`), "week,item\n1,rope\n");
      expect(await readError(`text.${ending}`)).toMatch(
        /^unreadable-file: Cannot read ".*" as .*: it does not start like a file of this format\./,
      );
    }
  });

  test("that is unknown asks for the format, and a folder is rejected", async () => {
    writeFileSync(at("record.dat"), "week,item\n1,rope\n");
    expect(await readError("record.dat")).toMatch(
      /^format-unknown: Unknown file extension "\.dat" in ".*"\. Give `format`: "csv", "tsv"/,
    );
    expect(await columns("record.dat", { format: "csv" })).toEqual({ week: [1], item: ["rope"] });
    expect(await readError("")).toMatch(/^unreadable-file: .* is a folder\./);
  });
});

describe("a broken file", () => {
  test("that is truncated is rejected in every format", async () => {
    const long = { name: "record", table: tableOf({ week: Array.from({ length: 5000 }, (_, i) => i) }) };
    for (const ending of ["parquet", "xlsx", "duckdb"]) {
      await writeTables([long], at(`whole.${ending}`));
      const bytes = readFileSync(at(`whole.${ending}`));
      writeFileSync(at(`cut.${ending}`), bytes.subarray(0, Math.floor(bytes.length / 2)));
      expect(await readError(`cut.${ending}`)).toMatch(/^(unreadable-file|no-data-rows|table-unclear): /);
    }
    writeFileSync(at("cut.json"), '[{"week": 1}, {"we');
    expect(await readError("cut.json")).toMatch(/^unreadable-file: Cannot read .* as JSON/);
  });

  test("of JSON that is not a record is rejected", async () => {
    for (const text of ["3", "[1, 2]", '{"a": 1}', '{"a": [1], "b": [1, 2]}']) {
      writeFileSync(at("other.json"), text);
      expect(await readError("other.json")).toContain(
        "it contains neither an array of row objects nor columns of equal length",
      );
    }
  });
});

describe("JSON", () => {
  test("is read as rows, as columns, and as one row per line", async () => {
    const expected = { week: [1, 2], item: ["rope", null] };
    const texts = [
      '[{"week": 1, "item": "rope"}, {"week": 2}]',
      '{"week": [1, 2], "item": ["rope", null]}',
      '{"week": 1, "item": "rope"}\n{"item": null, "week": 2}\n',
    ];
    for (const text of texts) {
      writeFileSync(at("record.json"), text);
      expect(await columns("record.json")).toEqual(expected);
    }
  });

  test("has columns named __proto__ and constructor like any other", async () => {
    writeFileSync(at("proto.json"), '[{"__proto__": 1, "constructor": "x"}]');
    const table = await readTable(at("proto.json"));
    expect(table.names).toEqual(["__proto__", "constructor"]);
    expect(table.columns).toEqual([Float64Array.from([1]), ["x"]]);
    expect(({} as { polluted?: unknown }).polluted).toBeUndefined();
  });
});

describe("a workbook", () => {
  test("gives the saved values of formulas, and says so", async () => {
    const sheet = workbooks.utils.aoa_to_sheet([
      ["week", "stock"],
      [1, 90],
      [2, 0],
    ]);
    sheet["B3"] = { t: "n", v: 83, f: "B2-7" };
    workbook("formulas.xlsx", { stock: sheet });
    const table = await readTable(at("formulas.xlsx"));
    expect(Array.from(table.columns[1]!)).toEqual([90, 83]);
    expect(table.source.found).toEqual(['Column "stock": read the saved value of 1 formula.']);
  });

  test("keeps a text that starts with = as text, written and read", async () => {
    const text = '=HYPERLINK("x")';
    await writeTables([{ name: "record", table: tableOf({ week: [1], note: [text] }) }], at("text.xlsx"));
    expect(await columns("text.xlsx")).toEqual({ week: [1], note: [text] });
    const cell = workbooks.read(readFileSync(at("text.xlsx"))).Sheets["record"]![
      "B2"
    ] as workbooks.CellObject;
    expect([cell.t, cell.f]).toEqual(["s", undefined]);
  });

  // Day numbers: 45382 is 2024-03-31 in the 1900 system (ECMA-376 part 1, 18.17.4.1); 0.5 is noon.
  test("gives dates as ISO text, with the time if there is one", async () => {
    const sheet = workbooks.utils.aoa_to_sheet([
      ["date", "owed"],
      [0, 300],
      [0, 200],
    ]);
    sheet["A2"] = { t: "n", v: 45382, z: "dd/mm/yyyy" };
    sheet["A3"] = { t: "n", v: 45412.5, z: "yyyy-mm-dd hh:mm" };
    workbook("dates.xlsx", { owed: sheet });
    expect(await columns("dates.xlsx")).toEqual({
      date: ["2024-03-31", "2024-04-30 12:00:00"],
      owed: [300, 200],
    });
  });

  test("keeps a cell error as text", async () => {
    const sheet = workbooks.utils.aoa_to_sheet([
      ["week", "stock"],
      [1, 90],
      [2, 0],
    ]);
    sheet["B3"] = { t: "e", v: 42, w: "#N/A" };
    workbook("errors.xlsx", { stock: sheet });
    expect(await columns("errors.xlsx")).toEqual({ week: [1, 2], stock: [90, "#N/A"] });
  });

  test("with several sheets asks for one", async () => {
    await writeTables([record, { ...record, name: "other" }], at("two.xlsx"));
    expect(await readError("two.xlsx")).toMatch(
      /^table-unclear: .* has several tables: "record" and "other"\. Choose one, such as table: "record"\./,
    );
    expect(await readError("two.xlsx", { table: "third" })).toMatch(/^no-such-table: /);
    expect(await columns("two.xlsx", { table: "other" })).toEqual({ week: [1, 2], item: ["rope", "tar"] });
  });
});

describe("a database file", () => {
  test("keeps its other tables when one is written, and asks for the one to read", async () => {
    await writeTables([record], at("store.duckdb"));
    await writeTables([{ name: "second", table: tableOf({ week: [3] }) }], at("store.duckdb"));
    expect(await readError("store.duckdb")).toMatch(/^table-unclear: /);
    expect(await columns("store.duckdb", { table: "second" })).toEqual({ week: [3] });
    expect(await columns("store.duckdb", { table: "record" })).toEqual({
      week: [1, 2],
      item: ["rope", "tar"],
    });
  });
});

describe("writing", () => {
  test("keeps the previous file when it fails", async () => {
    await writeTables([record], at("kept.json"));
    const before = readFileSync(at("kept.json"), "utf8");
    const infinite = { name: "record", table: tableOf({ week: [Number.POSITIVE_INFINITY] }) };
    await expect(writeTables([infinite], at("kept.json"))).rejects.toThrow(
      "JSON cannot represent infinity (row 1, week)",
    );
    expect(readFileSync(at("kept.json"), "utf8")).toBe(before);
  });

  test("rejects two tables for one text file, column names that differ only in case, and missing folders", async () => {
    await expect(writeTables([record, record], at("two.csv"))).rejects.toThrow(
      "there are 2 tables, and this format holds one",
    );
    const alike = { name: "record", table: tableOf({ Week: [1], week: [2] }) };
    await expect(writeTables([alike], at("alike.parquet"))).rejects.toThrow(
      'the columns "Week" and "week" differ only in case',
    );
    await expect(writeTables([record], at("none/record.csv"))).rejects.toThrow("its folder does not exist");
    await expect(writeTables([record], at("record.dat"))).rejects.toThrow('Unknown file extension ".dat"');
  });
});
