import { expect, test } from "vitest";
import { editDistance, ModelError, nearestNames } from "../../src/numeric/index.js";

// Source: textbook examples of the edit distance (kitten and sitting 3, saturday and sunday 3); the others by hand.
test.each([
  ["kitten", "sitting", 3],
  ["saturday", "sunday", 3],
  ["", "abc", 3],
  ["abc", "", 3],
  ["rate", "rate", 0],
  ["raet", "rate", 1],
  ["rtae", "rate", 1],
  ["abcdef", "badcfe", 3],
  ["ca", "abc", 3],
  ["owned", "owed", 1],
  ["paid", "pays", 2],
  ["aab", "aba", 1],
])("%s and %s are %i edits apart", (a, b, distance) => {
  expect(editDistance(a, b)).toBe(distance);
  expect(editDistance(b, a)).toBe(distance);
});

test("the nearest names come first, those that differ in case only before all others", () => {
  expect(nearestNames("capcity", ["rate", "capacitor", "capacity", "Capcity"])).toEqual([
    "Capcity",
    "capacity",
    "capacitor",
  ]);
  expect(nearestNames("aaaa", ["aaab", "aaac", "aaad", "aaae"])).toEqual(["aaab", "aaac", "aaad"]);
});

test("a longer name may be further off", () => {
  expect(nearestNames("abc", ["abd", "add"])).toEqual(["abd"]);
  expect(nearestNames("abcd", ["abee", "aeee"])).toEqual(["abee"]);
  expect(nearestNames("abcdef", ["abcdxx", "abcxxx"])).toEqual(["abcdxx"]);
  expect(nearestNames("abcdefg", ["abcdxxx", "abcxxxx"])).toEqual(["abcdxxx"]);
  expect(nearestNames("K", ["k", "K2", "rate"])).toEqual(["k", "K2"]);
});

test("an endless name is compared by its beginning", () => {
  expect(nearestNames("a".repeat(100), ["a".repeat(60), "a".repeat(90)])).toEqual(["a".repeat(60)]);
});

test("an error carries its code, its facts and its cause", () => {
  const cause = new RangeError("inner");
  const error = new ModelError("some-code", "Some message.", { value: 3 }, cause);
  expect({ ...error, name: error.name, message: error.message, cause: error.cause }).toEqual({
    name: "ModelError",
    code: "some-code",
    facts: { value: 3 },
    message: "Some message.",
    cause,
  });
  const plain = new ModelError("some-code", "Some message.");
  expect(plain.facts).toEqual({});
  expect("cause" in plain).toBe(false);
});
