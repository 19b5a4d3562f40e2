import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { DataFrame } from "danfojs-node";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { columnsOf, frame, toFrame } from "../../kernel-helpers/dataframe/index.js";
import {
  differences,
  observations,
  readRecord,
  writeRecord,
} from "../../kernel-helpers/functions/records.js";
import { fit } from "../../src/estimate/index.js";
import { type ColumnTable, type Observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";

const options = { period: "week", step: { every: 1, of: "week" }, value: "stock" } as const;

function plain({ groups, counts, ...rest }: Observations) {
  // Rows are those of the frame when it is read again, so they are left out of the comparison.
  return { ...rest, findings: rest.findings.length, groups: groups.map(({ rows: _, ...group }) => group) };
}

describe("frames in", () => {
  test("a frame, row objects and columns by name give the same record", () => {
    const columns = { week: [1, 2, 3], stock: [90, 83, 70] };
    const rows = [
      { week: 1, stock: 90 },
      { stock: 83, week: 2 },
      { week: 3, stock: 70 },
    ];
    const expected = observations(columns, options);
    for (const record of [toFrame(tableOf(columns)), rows, tableOf(columns)])
      expect(observations(record, options)).toEqual(expected);
  });

  // danfo takes the values of a row in the order of its keys, and shifts them where a key is missing.
  test("rows with reordered or missing keys keep every value in its own column", () => {
    expect(columnsOf([{ a: 1, b: "x" }, { b: "y", a: 2 }, { b: "z" }])).toEqual({
      names: ["a", "b"],
      columns: [Float64Array.from([1, 2, Number.NaN]), ["x", "y", "z"]],
    });
  });

  // danfo makes rows of the bytes of a typed array.
  test("typed arrays are accepted as columns", () => {
    const made = toFrame(columnsOf({ a: Float64Array.from([1.5, 2]), b: Int32Array.from([3, 4]) }));
    expect(made.values).toEqual([
      [1.5, 3],
      [2, 4],
    ]);
  });

  test("a value that is not a record is rejected", () => {
    expect(() => columnsOf(null as never)).toThrow("Not a record: null was given. Give a DataFrame");
    expect(() => columnsOf({ a: 1 } as never)).toThrow('Not a record: column "a" is not an array.');
    expect(() => columnsOf([1, 2] as never)).toThrow("Not a record: row 1 is not an object.");
    expect(() => columnsOf({ a: [1, 2], b: [1] })).toThrow("The columns differ in length");
  });
});

describe("frames out", () => {
  // danfo guesses a column's kind from its first rows: a text after twenty numbers would make sums of text.
  test("the kind of a column depends on all of its cells", () => {
    const cells = [...Array.from({ length: 30 }, (_, i) => i), "n.d."];
    expect(toFrame(tableOf({ a: cells })).dtypes).toEqual(["string"]);
  });

  // danfo makes a property of every column name: these would replace its own members or throw.
  test("column names that danfo cannot take are renamed in the frame and known to the functions", () => {
    const names = ["index", "values", "columns", "shape", "__proto__", "constructor", "", "week", "week"];
    const table: ColumnTable = { names, columns: names.map((_, i) => [i, i + 1]) };
    const made = toFrame(table);
    expect(made.shape).toEqual([2, 9]);
    expect(made.head(1).values).toEqual([[0, 1, 2, 3, 4, 5, 6, 7, 8]]);
    expect(columnsOf(made).names).toEqual(names);
  });

  test("arithmetic is exact in double precision", () => {
    // 0.1 + 0.2 in IEEE 754 double arithmetic; single precision would give 0.30000001192092896.
    expect((toFrame(tableOf({ a: [0.1] })).add(0.2) as DataFrame).values).toEqual([[0.30000000000000004]]);
  });

  // danfo's own copy shares its rows with the original.
  test("a frame made from a record does not share its cells", () => {
    const read = toFrame(tableOf({ week: [1, 2], stock: [90, 83] }));
    const made = toFrame(columnsOf(read));
    made.setIndex({ index: ["a", "b"], inplace: true });
    (made.values as number[][])[0]![1] = 0;
    expect(read.values).toEqual([
      [1, 90],
      [2, 83],
    ]);
  });

  test("observations can be used as a record", () => {
    const counts = observations({ week: [1, 2, 4], stock: [9, 8, 6] }, options);
    expect(frame(counts).columns).toEqual(["row", "step", "week", "stock"]);
    expect(plain(observations(counts, options))).toEqual(plain(counts));
  });

  test("any result is written to a workbook with one sheet per table", async () => {
    const counts = observations(
      { hour: [0, 1, 2, 3, 4, 5, 6], N: [10, 18, 31, 50, 69, 85, 93] },
      { period: "hour", step: "hour", value: "N" },
    );
    const folder = mkdtempSync(join(tmpdir(), "periodwise-result-"));
    const path = join(folder, "crowding.xlsx");
    await writeRecord(fit(recurrence("ΔN = r*N*(1 - N/K)"), counts, { errors: "observation" }), path);
    const estimates = await readRecord(path, { table: "estimates" });
    expect(estimates.column("name").values).toEqual(expect.arrayContaining(["r", "K"]));
    await expect(readRecord(path)).rejects.toThrow('several tables: "estimates", "points" and "summary"');
    rmSync(folder, { recursive: true, force: true });
  });

  test("a fit gives three frames, and differences one", () => {
    const counts = observations(
      { hour: [0, 1, 2, 3, 4, 5, 6], N: [10, 18, 31, 50, 69, 85, 93] },
      { period: "hour", step: "hour", value: "N" },
    );
    const views = frame(fit(recurrence("ΔN = r*N*(1 - N/K)"), counts, { errors: "observation" }));
    expect(Object.keys(views)).toEqual(["estimates", "points", "summary"]);
    expect(views.estimates.column("name").values).toEqual(expect.arrayContaining(["r", "K"]));
    expect(views.points.shape[0]).toBe(7);
    expect(frame(differences(counts)).column("change").values).toEqual([8, 13, 19, 19, 16, 8]);
  });

  test("a result with nested series gives one table per list, with inherited values", () => {
    const made = frame({
      kind: "anything",
      seed: 4,
      groups: [
        { group: "a", index: [0, 1], states: [{ state: "N", median: [5, 6] }] },
        { group: "b", index: [0, 1], states: [{ state: "N", median: [7, 8] }] },
      ],
    } as never) as unknown as Record<string, DataFrame>;
    expect(made["states"]!.columns).toEqual(["seed", "group", "state", "index (column)", "median (column)"]);
    expect(made["states"]!.values[3]).toEqual([4, "b", "N", 1, 8]);
  });
});

test("observations of several series with weights, limits and replicates are recovered from their frame", () => {
  const rows = ["a", "b"].flatMap((item) =>
    [1, 2, 4].flatMap((week) =>
      [1, 2].map((well) => ({
        item,
        week,
        well,
        weight: 2,
        stock: week * (item === "a" ? 3 : 5) + well,
        out: week === 4,
      })),
    ),
  );
  const once = observations(rows, {
    ...options,
    by: "item",
    replicates: "well",
    weight: "weight",
    censored: { above: "out" },
  });
  const made = frame(once);
  expect(made.columns).toEqual([
    "series",
    "row",
    "step",
    "week",
    "stock",
    "weight",
    "stock censored",
    "stock replicates",
    "stock deviation",
  ]);
  const again = observations(made, {
    ...options,
    by: "series",
    weight: "weight",
    censored: { above: "stock censored" },
  });
  expect(again.groups.map(({ replicates: _, rows: __, ...group }) => group)).toEqual(
    once.groups.map(({ replicates: _, rows: __, ...group }) => group),
  );
});

test("any observations converted to a frame and back are unchanged", () => {
  const record = fc
    .array(
      fc.record({
        gap: fc.integer({ min: 1, max: 3 }),
        stock: fc.double({ noNaN: true, noDefaultInfinity: true }),
        input: fc.integer(),
      }),
      { minLength: 2, maxLength: 20 },
    )
    .map((steps) => {
      let week = 0;
      return steps.map(({ gap, stock, input }) => {
        week += gap;
        return { week, stock, input };
      });
    });
  fc.assert(
    fc.property(record, (rows) => {
      const all = { ...options, inputs: ["input"] };
      const once = observations(rows, all);
      const again = observations(frame(once), all);
      expect(plain(again)).toEqual(plain(once));
    }),
    { seed: 20260401, numRuns: 80 },
  );
});
