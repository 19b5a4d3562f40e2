import { afterEach, describe, expect, test } from "vitest";
import {
  bundleOf,
  type Column,
  numberFormat,
  type Table,
  table,
  tableText,
  tabSeparated,
} from "../../kernel-helpers/tables/index.js";

afterEach(() => void numberFormat("standard"));

const estimate: Column[] = [
  { key: "name", label: "Parameter", kind: "text" },
  { key: "value", label: "Estimate", kind: "estimate", pairedWith: "error" },
  { key: "error", label: "Standard error", kind: "estimate" },
];

function cells(made: Table): string[][] {
  const lines = tableText(made).split("\n").slice(4);
  return lines.map((line) => line.trim().split(/\s{2,}/));
}

describe("digits", () => {
  // Source: JCGM 100:2008 (GUM) 7.2.6: at most two significant digits of the standard uncertainty, the estimate
  // rounded to be consistent with it. The values are its examples H.1 and the style of 7.2.2.
  test("an estimate is rounded to the second digit of its standard error", () => {
    const rows = [
      { name: "m", value: 100.02147, error: 0.00035 },
      { name: "l", value: 50000838, error: 32 },
      { name: "K", value: 1519.93, error: 56.6 },
      { name: "N0", value: 0.0198154, error: 0.000382 },
    ];
    expect(cells(table({ title: "", columns: estimate, rows }))).toEqual([
      ["m", "100.02147", "0.00035"],
      ["l", "50,000,838", "32"],
      ["K", "1,520", "57"],
      ["N0", "0.01982", "0.00038"],
    ]);
  });

  test("without a standard error an estimate has three digits, and the reason is shown", () => {
    const rows = [{ name: "K", value: 1519.93, error: "not determined" }];
    expect(cells(table({ title: "", columns: estimate, rows }))).toEqual([["K", "1,520", "not determined"]]);
  });

  test("a probability has no more digits than its Monte Carlo error allows", () => {
    const columns: Column[] = [{ key: "p", label: "P", kind: "probability", pairedWith: "mc" }];
    const rows = [
      { p: 0.54432, mc: 0.0011 },
      { p: 0.0002, mc: 0.0011 },
      { p: 0.9999, mc: 0.0011 },
      { p: 0, mc: 0.0011 },
    ];
    expect(cells(table({ title: "", columns, rows }))).toEqual([
      ["0.544"],
      ["<0.001"],
      [">0.999"],
      ["0.000"],
    ]);
  });

  test("money is exact at any size and has the currency of the number format", () => {
    numberFormat({ currency: "EUR" });
    const columns: Column[] = [{ key: "owed", label: "Owed", kind: "money" }];
    // 2^53 + 1 cents is no double; a tie of the printed decimal goes up (1.035 -> 1.04).
    const rows = [{ owed: 9007199254740993n }, { owed: 1.035 }, { owed: "103.50" }];
    const text = tableText(table({ title: "", columns, rows }));
    expect(text).toContain("Owed (EUR)");
    expect(text).toContain("90,071,992,547,409.93");
    expect(text).toContain("1.04");
    expect(text).toContain("103.50");
  });

  test("numbers of one column have the same decimals", () => {
    const columns: Column[] = [{ key: "n", label: "Level", kind: "number" }];
    const rows = [13.9, 18.08, 107, 134.5].map((n) => ({ n }));
    expect(cells(table({ title: "", columns, rows }))).toEqual([["13.9"], ["18.1"], ["107.0"], ["134.5"]]);
  });

  test("the number format does not depend on the machine", () => {
    numberFormat({ decimal: ",", group: "." });
    const columns: Column[] = [{ key: "n", label: "Level", kind: "number", digits: 8 }];
    expect(cells(table({ title: "", columns, rows: [{ n: 1234567.5 }] }))).toEqual([["1.234.567,5"]]);
  });
});

test("decimal signs of plain numbers are aligned", () => {
  const columns: Column[] = [{ key: "n", label: "Level", kind: "number" }];
  const rows = [0.5, 13.25, -107, 1e-7, 2e6].map((n) => ({ n }));
  const lines = tableText(table({ title: "", columns, rows }))
    .split("\n")
    .slice(4);
  const places = lines
    .filter((line) => line.includes(".") && !line.includes("e"))
    .map((line) => line.indexOf("."));
  expect(new Set(places).size).toBe(1);
});

test("text is aligned in a terminal, with wide characters and footnote marks", () => {
  const made = table({
    title: "Estimates",
    columns: [...estimate, { key: "unit", label: "Unit", kind: "text" }],
    rows: [
      { name: "K", value: 167.3, error: 16.2, unit: "10^4/mL" },
      { name: "日本語", value: 4.61, error: 0.158, unit: "" },
      { name: "r", value: -1.4721, error: 0.0183 },
    ],
    totals: [{ name: "Sum", value: 3 }],
    notes: ["Profile intervals.", { text: "correlated with r", column: "value", row: 0 }],
  });
  expect(tableText(made)).toMatchInlineSnapshot(`
    "Estimates

    Parameter   Estimate  Standard error  Unit
    ─────────  ─────────  ──────────────  ───────
    K             167 a)              16  10^4/mL
    日本語       4.61               0.16
    r          -1.472              0.018  –
    ─────────  ─────────  ──────────────  ───────
    Sum             3

    Profile intervals.
    a: correlated with r
    –: no value"
  `);
});

test("the heading of the second interval limit is written in full", () => {
  const columns: Column[] = [
    { key: "a", label: "Interval 95%, from", unit: "h", kind: "number" },
    { key: "b", label: "to", unit: "h", kind: "number" },
  ];
  const text = tableText(table({ title: "", columns, rows: [{ a: 1, b: 2 }] }));
  expect(text).toContain("Interval 95%, from (h)  Interval 95%, to (h)");
});

test("powers in units are superscripts, and separated from a number before them", () => {
  const made = table({
    title: "When N reaches 120 10^4 cells/mL",
    columns: [{ key: "a", label: "A", unit: "m^2", kind: "text" }],
    rows: [],
  });
  expect(tableText(made)).toContain("When N reaches 120 × 10⁴ cells/mL");
  expect(tableText(made)).toContain("A (m²)");
});

test("rows beyond the limit are counted, and the last rows are shown", () => {
  const rows = Array.from({ length: 1000 }, (_, n) => ({ n }));
  const text = tableText(
    table({ title: "", columns: [{ key: "n", label: "Week", kind: "integer" }], rows, limit: 8 }),
  );
  expect(
    text
      .split("\n")
      .slice(4, 13)
      .map((line) => line.trim()),
  ).toEqual(["0", "1", "2", "3", "4", "5", "…", "998", "999"]);
  expect(text).toContain("Rows 1 to 6 and 999 to 1,000 of 1,000 are shown.");
});

test("tab-separated text has every row, full precision, and no tab or line break inside a cell", () => {
  // Source: IANA media type text/tab-separated-values: fields hold no tabs.
  const made = table({
    title: "",
    columns: [
      { key: "a", label: "Name\tof it", kind: "text" },
      { key: "b", label: "Value", kind: "number", unit: "kg" },
      { key: "c", label: "Owed", kind: "money" },
    ],
    rows: [
      { a: "x\ty\nz", b: 1 / 3, c: 5n },
      { a: "=1+1", b: Number.NaN },
    ],
    limit: 1,
  });
  expect(tabSeparated(made)).toBe("Name of it\tValue (kg)\tOwed\nx y z\t0.3333333333333333\t0.05\n'=1+1\t\t");
});

test("hostile texts are escaped in HTML and in a terminal", async () => {
  const hostile = `<img src=x onerror=alert(1)></script><!-- "' & $x$ \u001b[31m\u202eabc`;
  const made = table({
    title: hostile,
    columns: [{ key: "k", label: hostile, unit: hostile, kind: "text" }],
    rows: [{ k: hostile }],
    notes: [hostile],
  });
  const shown = await bundleOf(made);
  const html = String(shown?.["text/html"]);
  expect(html).not.toContain("<img");
  expect(html).not.toContain("</script");
  for (const acting of ["\u001b", "\u202e"]) expect(html).not.toContain(acting);
  for (const acting of ["\u001b", "\u202e"]) expect(shown?.["text/plain"]).not.toContain(acting);
});

test("a table has a hidden display method, and is frozen", async () => {
  const made = table({ title: "T", columns: [{ key: "n", label: "Week", kind: "integer" }], rows: [] });
  expect(Object.keys(made)).not.toContain("text/html");
  expect(Object.isFrozen(made)).toBe(true);
  expect({ ...made }.kind).toBe("table");
  expect(String((await bundleOf(made))?.["text/plain"])).toContain("(no rows)");
});

test.each([
  [() => table({ title: "Levels", columns: [], rows: [] }), "no-columns"],
  [
    () =>
      table({
        title: "Levels",
        columns: [
          { key: "n", label: "A", kind: "text" },
          { key: "n", label: "B", kind: "text" },
        ],
        rows: [],
      }),
    "column-repeated",
  ],
  [
    () => table({ title: "Levels", columns: [{ key: "n", label: "A", kind: "weight" as never }], rows: [] }),
    "option-wrong",
  ],
])("an invalid table is rejected", (make, code) => {
  expect(make).toThrowError(expect.objectContaining({ name: "ModelError", code }));
});
