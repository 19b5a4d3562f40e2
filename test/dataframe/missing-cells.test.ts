import type { DataFrame, Series } from "danfojs-node";
import { expect, test } from "vitest";
import { columnsOf, toFrame } from "../../kernel-helpers/dataframe/index.js";
import { tableOf } from "../../src/record/index.js";

const readings = (): DataFrame =>
  toFrame(tableOf({ reading: [1.5, null, 2.5], blank: [0.5, 0.74, 0.5], who: ["a", null, "c"] }));

const column = (frame: DataFrame, name: string): Series => frame.column(name) as Series;

// Common practice, no source: a missing reading is missing in whatever is computed from it.
test("arithmetic on a missing cell gives a missing cell, never a number", () => {
  const reading = column(readings(), "reading");
  const blank = column(readings(), "blank");
  for (const [operation, expected] of [
    ["add", 2],
    ["sub", 1],
    ["mul", 0.75],
    ["div", 3],
  ] as const) {
    const made = (reading[operation](blank) as Series).values;
    expect(made[0]).toBe(expected);
    expect(made[1]).toBeNaN();
    expect((blank[operation](reading) as Series).values[1]).toBeNaN();
    expect((reading[operation](1) as Series).values[1]).toBeNaN();
  }
  const numbers = readings().loc({ columns: ["reading", "blank"] });
  expect((numbers.sub(1) as DataFrame).values).toEqual([
    [0.5, -0.5],
    [Number.NaN, -0.26],
    [1.5, -0.5],
  ]);
});

test("statistics skip missing cells", () => {
  const reading = column(readings(), "reading");
  expect(reading.mean()).toBe(2);
  expect(reading.sum()).toBe(4);
  expect(reading.count()).toBe(2);
  expect(reading.min()).toBe(1.5);
  expect(reading.max()).toBe(2.5);
  // Of 1.5 and 2.5: variance 1/2 by the definition with n - 1.
  expect(reading.std()).toBe(Math.sqrt(0.5));
  expect(reading.isNa().values).toEqual([false, true, false]);
});

test("missing cells can be dropped and filled, and are written as empty", () => {
  expect(column(readings(), "reading").dropNa().values).toEqual([1.5, 2.5]);
  expect(column(readings(), "reading").fillNa(9).values).toEqual([1.5, 9, 2.5]);
  expect(readings().dropNa().values).toEqual([
    [1.5, 0.5, "a"],
    [2.5, 0.5, "c"],
  ]);
});

test("a missing cell is read back as missing", () => {
  const back = columnsOf(readings());
  expect(back.columns[0]).toEqual(Float64Array.from([1.5, Number.NaN, 2.5]));
  expect(back.columns[2]).toEqual(["a", null, "c"]);
});

test("the standard deviation of one value is undefined, not zero", () => {
  expect(column(toFrame(tableOf({ a: [3] })), "a").std()).toBeNaN();
});
