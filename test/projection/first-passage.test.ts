// When a level is reached, by hand on short paths, and against exact probabilities.
import { describe, expect, test } from "vitest";
import { firstPassage, passageLog } from "../../src/projection/index.js";

const never = Number.POSITIVE_INFINITY;

/** The same question to one kept path and to a log that is given its values row by row. */
function both(
  values: readonly number[],
  level: number,
  options: {
    readonly sign?: 1 | -1;
    readonly from?: number;
    readonly to?: number;
    readonly beyond?: [number, number];
  } = {},
): readonly number[] {
  const { sign = -1, from = 0, to = never, beyond } = options;
  const question = { sign, levels: Float64Array.of(level), from, to };
  const passed = beyond && { row: Int32Array.of(beyond[0]), value: Float64Array.of(beyond[1]) };
  const kept = { paths: 1, rows: values.length, values: Float64Array.from(values), passed };
  const log = passageLog(1, question);
  values.forEach((value, row) => {
    const told = beyond?.[0] === row ? [{ path: 0, state: 0, value: beyond[1] }] : [];
    log.add(row, Float64Array.of(value), told);
  });
  return [firstPassage(kept, 0, question, false)?.between ?? never, log.at[0]!];
}

describe("a level is reached", () => {
  // Source of all: two points of a straight line, by hand.
  test("between two values on the straight line, from above and from below", () => {
    expect(both([10, 6, 2], 4)).toEqual([1.5, 1.5]);
    expect(both([0, 4, 12], 6, { sign: 1 })).toEqual([1.25, 1.25]);
  });

  test("by a value exactly on it, in the first period too", () => {
    expect(both([2, 0, 0], 0)).toEqual([1, 1]);
    expect(both([2, 1, 0], 1)).toEqual([1, 1]);
  });

  test("by the first value that counts, and by none before it", () => {
    expect(both([3, 5, 1], 5)).toEqual([0, 0]);
    expect(both([1, 8, 9, 2], 4, { from: 1 })).toEqual([2 + 5 / 7, 2 + 5 / 7]);
    expect(both([9, 3, 8, 9], 4, { from: 2 })).toEqual([never, never]);
    expect(both([9, 8, 7, 2], 4, { to: 2 })).toEqual([never, never]);
  });

  test("by a jump beyond a bound, whether the path then stays there or ends", () => {
    expect(both([10, 5, 0, 0], 0, { beyond: [2, -5] })).toEqual([1.5, 1.5]);
    expect(both([10, 5, Number.NaN, Number.NaN], 0, { beyond: [2, -5] })).toEqual([1.5, 1.5]);
    expect(both([10, 5, 0, 0], 2.5, { beyond: [2, -5] })).toEqual([1.25, 1.25]);
  });

  test("never by a path that ends before it", () => {
    expect(both([10, 5, Number.NaN], 0)).toEqual([never, never]);
  });
});

test("each path is held against its own level", () => {
  const question = { sign: 1, levels: Float64Array.of(2, 4), from: 0, to: never } as const;
  const kept = { paths: 2, rows: 3, values: Float64Array.of(0, 2, 4, 0, 2, 4) };
  expect([0, 1].map((path) => firstPassage(kept, path, question, false)!.row)).toEqual([1, 2]);
});
