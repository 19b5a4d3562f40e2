import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { type ReadOptions, readTable, type StoredTable } from "../../src/store/index.js";

let folder = "";
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "periodwise-store-"));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

let files = 0;

async function read(
  content: string | Uint8Array,
  options?: ReadOptions,
  ending = "csv",
): Promise<StoredTable> {
  const path = join(folder, `record-${files++}.${ending}`);
  writeFileSync(path, content);
  return readTable(path, options);
}

async function columns(content: string | Uint8Array, options?: ReadOptions, ending = "csv") {
  const table = await read(content, options, ending);
  return Object.fromEntries(table.names.map((name, i) => [name, Array.from(table.columns[i]!)]));
}

async function readError(
  content: string | Uint8Array,
  options?: ReadOptions,
  ending = "csv",
): Promise<string> {
  const thrown = await read(content, options, ending).then(
    () => ({ code: "no error", message: "" }),
    (error: unknown) => error as { code: string; message: string },
  );
  return `${thrown.code}: ${thrown.message.replaceAll(folder, "")}`;
}

describe("a delimited file", () => {
  test("is read with every delimiter", async () => {
    const expected = { week: [1, 2], stock: [90.5, 83] };
    for (const delimiter of [",", ";", "\t", "|"]) {
      const text = `week${delimiter}stock\n1${delimiter}90.5\n2${delimiter}83\n`;
      expect(await columns(text)).toEqual(expected);
    }
  });

  test("is read with every line ending", async () => {
    for (const end of ["\n", "\r\n", "\r"])
      expect(await columns(`week,stock${end}1,90${end}2,83${end}`)).toEqual({
        week: [1, 2],
        stock: [90, 83],
      });
    expect(await columns("week,stock\r\n1,90\n2,83")).toEqual({ week: [1, 2], stock: [90, 83] });
  });

  // RFC 4180, section 2, rules 5 to 7: quoted cells, line breaks and doubled quotes in them.
  test("keeps delimiters, line breaks and quotes inside quoted cells (RFC 4180)", async () => {
    expect(await columns('who,said\n"Ferry, north","a ""short"" note"\nStore,"two\nlines"\n')).toEqual({
      who: ["Ferry, north", "Store"],
      said: ['a "short" note', "two\nlines"],
    });
  });

  test("distinguishes an empty cell from zero", async () => {
    expect(await columns("week,stock\n1,\n2,0\n")).toEqual({ week: [1, 2], stock: [Number.NaN, 0] });
  });

  test("is read with a decimal comma when the cells have one", async () => {
    const table = await read("week;stock\n1;1.234,50\n2;0,5\n");
    expect(Array.from(table.columns[1]!)).toEqual([1234.5, 0.5]);
    expect(table.source.found).toEqual(["Numbers are read with a decimal comma."]);
  });

  test("is read with thousands separated by commas, spaces or apostrophes", async () => {
    expect(await columns('week,owed\n1,"1,234.50"\n2,"2,000,000.00"\n')).toEqual({
      week: [1, 2],
      owed: [1234.5, 2e6],
    });
    expect(await columns("week;owed\n1;1 234,5\n2;12\u00a0000,25\n")).toEqual({
      week: [1, 2],
      owed: [1234.5, 12000.25],
    });
    expect(await columns("week;owed\n1;1'234.5\n2;7.25\n")).toEqual({ week: [1, 2], owed: [1234.5, 7.25] });
  });

  test("asks for the decimal sign when cells contradict each other or leave it open", async () => {
    expect(await readError('row;balance\n1;1.234,56\n2;"1,234.56"\n')).toBe(
      'decimal-sign-unclear: Row 2, balance: the decimal sign of "1,234.56" is unclear. Give decimal: "," or decimal: ".".',
    );
    expect(await readError("row;balance\n1;1.234\n2;5.678\n")).toContain(
      'decimal-sign-unclear: Row 1, balance: the decimal sign of "1.234"',
    );
    expect(await columns("row;balance\n1;1.234\n2;5.678\n", { decimal: "," })).toEqual({
      row: [1, 2],
      balance: [1234, 5678],
    });
    expect(await columns("row;balance\n1;1.234\n2;5.678\n", { decimal: "." })).toEqual({
      row: [1, 2],
      balance: [1.234, 5.678],
    });
  });

  test("reads amounts in brackets or with a trailing minus as negative, and says so", async () => {
    const table = await read("row;paid\n1;(412.00)\n2;35.50-\n3;-7\n");
    expect(Array.from(table.columns[1]!)).toEqual([-412, -35.5, -7]);
    expect(table.source.found).toEqual([
      'Column "paid": read 2 amounts in brackets or with a trailing minus as negative.',
    ]);
  });

  test("detects the order of day and month from a day above twelve, and asks when there is none", async () => {
    expect(await columns("date,owed\n03/04/2025,1\n17/04/2025,2\n")).toEqual({
      date: ["2025-04-03", "2025-04-17"],
      owed: [1, 2],
    });
    expect(await columns("date,owed\n3/4/2025 9:30,1\n3/17/2025 14:05,2\n")).toEqual({
      date: ["2025-03-04 09:30", "2025-03-17 14:05"],
      owed: [1, 2],
    });
    expect(await readError("date,owed\n03/04/2025,1\n04/04/2025,2\n")).toBe(
      'ambiguous-date: Row 1, date: the date "03/04/2025" is ambiguous. Give dates: "day-month-year" or dates: "month-day-year"; dates: "text" leaves the column unchanged.',
    );
    expect(await readError("date,owed\n13/04/2025,1\n04/14/2025,2\n")).toContain(
      'mixed-dates: Row 2, date: "04/14/2025" is not a date in the order day-month-year',
    );
    expect(await columns("date,owed\n03/04/2025,1\n", { dates: "month-day-year" })).toEqual({
      date: ["2025-03-04"],
      owed: [1],
    });
    expect(await columns("date,owed\n03/04/2025,1\n", { dates: "text" })).toEqual({
      date: ["03/04/2025"],
      owed: [1],
    });
    expect(await columns("date,owed\n2025/4/3,1\n", {})).toEqual({ date: ["2025-04-03"], owed: [1] });
    expect(await columns("date,owed\n3 Apr 2025,1\n", {})).toEqual({ date: ["2025-04-03"], owed: [1] });
  });

  test("keeps the one non-number of a numeric column as text, and says where it is", async () => {
    const rows = Array.from({ length: 9 }, (_, i) => `${i};${i},5`);
    const table = await read(`week;coils\n${rows.join("\n")}\n9;15O,2\n`);
    expect(Array.from(table.columns[1]!)).toEqual([0.5, 1.5, 2.5, 3.5, 4.5, 5.5, 6.5, 7.5, 8.5, "15O,2"]);
    expect(table.source.found).toEqual([
      "Numbers are read with a decimal comma.",
      'Column "coils" has numbers, but row 10 is "15O,2"; such cells are kept as text.',
    ]);
  });

  test("finds a bad cell far below the first rows, where the database engine rejects the file", async () => {
    const rows = Array.from({ length: 9000 }, (_, i) => `${i},${i === 8499 ? "x9" : i + 0.5}`);
    const table = await read(`week,coils\n${rows.join("\n")}\n`);
    expect(table.columns[1]![8499]).toBe("x9");
    expect(table.columns[1]![8500]).toBe(8500.5);
    expect(table.source.found).toEqual([
      'Column "coils" has numbers, but row 8500 is "x9"; such cells are kept as text.',
    ]);
    const ragged = [...rows.slice(0, 8000), "8000", ...rows.slice(8001)];
    expect(await readError(`week,coils\n${ragged.join("\n")}\n`)).toMatch(
      /^ragged-row: Row 8001 \(line 8002\)/,
    );
    const long = [...rows.slice(0, 8499), "8499,12345678901234567", ...rows.slice(8500)];
    expect((await read(`week,coils\n${long.join("\n")}\n`)).columns[1]![8499]).toBe("12345678901234567");
  });

  test("keeps codes as text: leading zeros and more digits than a double holds", async () => {
    expect(await columns("item,id\n007,12345678901234567\n012,2\n")).toEqual({
      item: ["007", "012"],
      id: ["12345678901234567", "2"],
    });
  });

  test("reads the listed texts as missing values, and no others", async () => {
    expect(await columns("week,stock\n1,n.d.\n2,83\n", { missing: ["n.d."] })).toEqual({
      week: [1, 2],
      stock: [Number.NaN, 83],
    });
    expect(await columns("week,stock\n1,n.d.\n2,83\n")).toEqual({ week: [1, 2], stock: ["n.d.", "83"] });
  });

  test("is read in UTF-8 and UTF-16 with a byte-order mark, and in another encoding when given", async () => {
    const text = "jour,valeur\nété,1\nhiver,2\n";
    const expected = { jour: ["été", "hiver"], valeur: [1, 2] };
    expect(await columns(`\ufeff${text}`)).toEqual(expected);
    expect(await columns(Buffer.from(`\ufeff${text}`, "utf16le"))).toEqual(expected);
    expect(await columns(Buffer.from(text, "latin1"), { encoding: "windows-1252" })).toEqual(expected);
    expect(await readError(Buffer.from(text, "latin1"))).toBe(
      'encoding-unclear: Line 2 of "/record-FILE.csv" is not UTF-8: "été,1". Give `encoding`, such as encoding: "windows-1252", or save the file as UTF-8.'.replace(
        "FILE",
        String(files - 1),
      ),
    );
  });

  test("mixed encodings are rejected with the first line of the second one", async () => {
    const mixed = Buffer.concat([
      Buffer.from("jour,valeur\nété,1\n", "utf8"),
      Buffer.from("été,2\n", "latin1"),
    ]);
    expect(await readError(mixed)).toContain("encoding-unclear: Line 3");
  });

  test("rejects ragged rows, open quotes, missing headers, empty files and unknown delimiters, with the place", async () => {
    expect(await readError("a,b\n1,2\n3\n")).toMatch(
      /^ragged-row: Row 2 \(line 3\) of ".*" has 1 cell; the header has 2\./,
    );
    expect(await readError("a,b\n1,2,3\n")).toMatch(/^ragged-row: Row 1 \(line 2\)/);
    expect(await readError('a,b\n1,"open\n')).toMatch(
      /^unended-quote: The quoted cell that starts on line 2/,
    );
    expect(await readError("1,2\n3,4\n")).toMatch(
      /^header-missing: The first row of ".*" has numbers instead of column names: 1, 2\./,
    );
    expect(await readError("a,b\n")).toMatch(/^no-data-rows: No data rows were found in /);
    expect(await readError("")).toMatch(/^no-data-rows: No data rows were found in /);
    expect(await readError("a,b;c\n1,2;3\n")).toMatch(/^delimiter-unclear: Cannot detect the delimiter of /);
    expect(await columns("1,2\n3,4\n", { header: false })).toEqual({
      "column 1": [1, 3],
      "column 2": [2, 4],
    });
    expect(await columns("Store list\nmade today\na,b\n1,2\n", { skip: 2 })).toEqual({ a: [1], b: [2] });
  });

  test("renames empty and repeated column names, and keeps all others", async () => {
    const table = await read("__proto__,,owed,owed,<b>x</b>\n1,2,3,4,5\n");
    expect(table.names).toEqual(["__proto__", "column 2", "owed", "owed (2)", "<b>x</b>"]);
    expect(table.source.found).toEqual([
      'Column 2 has no name; it is called "column 2".',
      'Column 4 repeats the name "owed"; it is called "owed (2)".',
    ]);
  });

  test("skips empty rows at the end and says how many", async () => {
    const table = await read("week;stock\n1;2\n;\n;\n");
    expect(table.source.rows).toBe(1);
    expect(table.source.found).toEqual(["Skipped 2 empty rows at the end."]);
  });

  test("reads a cell that starts with = as text", async () => {
    expect(await columns('week,note\n1,=1+1\n2,"=HYPERLINK(""x"")"\n')).toEqual({
      week: [1, 2],
      note: ["=1+1", '=HYPERLINK("x")'],
    });
  });
});

test("a missing file is rejected with the nearest name in the folder", async () => {
  writeFileSync(join(folder, "stock-levels.csv"), "a,b\n1,2\n");
  await expect(readTable(join(folder, "stock-level.csv"))).rejects.toThrow(
    /Did you mean "stock-levels.csv"\?/,
  );
});

test("the checksum is the SHA-256 of the file's bytes", async () => {
  // Source: FIPS 180-4 example, SHA-256 of "abc".
  const table = await read("abc", { header: false });
  expect(table.source.checksum).toBe("ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
});
