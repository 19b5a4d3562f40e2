import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { freezeDeep, frozenCopy } from "../../src/numeric/index.js";

/** Lists and records inside a value that are not frozen. */
function open(value: unknown, seen = new Set<unknown>()): number {
  if (typeof value !== "object" || value === null || ArrayBuffer.isView(value) || seen.has(value)) return 0;
  seen.add(value);
  const own = Object.isFrozen(value) ? 0 : 1;
  return Object.values(value).reduce<number>((sum, part) => sum + open(part, seen), own);
}

const plain = fc.jsonValue({ maxDepth: 5 });

describe("freezeDeep", () => {
  test("freezes every list and record of any plain value, and returns it", () => {
    fc.assert(
      fc.property(plain, (value) => {
        const before = JSON.stringify(value);
        expect(freezeDeep(value)).toBe(value);
        expect(open(value)).toBe(0);
        expect(JSON.stringify(value)).toBe(before);
      }),
      { seed: 11 },
    );
  });

  test("reaches into what was frozen on its surface only", () => {
    const inner = { list: [1] };
    freezeDeep(Object.freeze({ inner }));
    expect(open(inner)).toBe(0);
  });

  test("meets a part that holds itself once, and leaves classes and typed arrays alone", () => {
    const values = Float64Array.of(1, 2);
    const date = new Date(0);
    const map = new Map([["a", {}]]);
    const result: Record<string, unknown> = { values, date, map };
    result["self"] = result;
    freezeDeep(result);
    expect(Object.isFrozen(result)).toBe(true);
    values[0] = 5;
    expect(Object.isFrozen(date) || Object.isFrozen(map)).toBe(false);
  });
});

describe("frozenCopy", () => {
  test("is equal to what was given, frozen, and shares no list or record with it", () => {
    fc.assert(
      fc.property(fc.array(plain, { minLength: 1 }), (value) => {
        const copy = frozenCopy(value);
        expect(copy).toEqual(value);
        expect(open(copy)).toBe(0);
        expect(Object.isFrozen(value)).toBe(false);
      }),
      { seed: 12 },
    );
  });

  test("a part that holds itself holds the copy", () => {
    const given: Record<string, unknown> = { list: [] };
    given["self"] = given;
    const copy = frozenCopy(given);
    expect(copy["self"]).toBe(copy);
    expect(Object.isFrozen(given)).toBe(false);
  });

  test("keeps results, functions, typed arrays and objects with a class", () => {
    const result = freezeDeep({ kind: "fit" });
    const given = { result, call: () => 1, values: Float64Array.of(1), signal: new AbortController().signal };
    const copy = frozenCopy(given);
    expect(copy.result).toBe(result);
    expect(copy.call).toBe(given.call);
    expect(copy.values).toBe(given.values);
    expect(copy.signal).toBe(given.signal);
  });
});
