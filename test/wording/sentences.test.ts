import fc from "fast-check";
import { expect, test } from "vitest";
import { capitalizeSentence, joinSentences, list, nOfM, plural } from "../../kernel-helpers/wording/index.js";

// Source of every expected text: English grammar and punctuation, common practice, no source.
test("a count takes the singular for one thing only", () => {
  expect([0, 1, 2, 12345].map((n) => plural(n, "row"))).toEqual(["0 rows", "1 row", "2 rows", "12,345 rows"]);
  expect(plural(2, "series", "series")).toBe("2 series");
  expect(plural(2, "trajectory", "trajectories")).toBe("2 trajectories");
});

test("a list is joined by commas and a conjunction", () => {
  expect(list([])).toBe("none");
  expect(list(["a"])).toBe("a");
  expect(list(["a", "b"])).toBe("a and b");
  expect(list(["a", "b", "c"], "or")).toBe("a, b or c");
});

test("n of m is counted, with none and all in words", () => {
  expect(nOfM(3, 12, "series", "series")).toBe("3 of 12 series");
  expect(nOfM(0, 12, "row")).toBe("none of the 12 rows");
  expect(nOfM(12, 12, "row")).toBe("all 12 rows");
  expect(nOfM(1, 1, "row")).toBe("1 of 1 row");
});

test("a sentence begins with a capital, and a column name keeps its letters", () => {
  expect(capitalizeSentence("the risk is 3%")).toBe("The risk is 3%");
  expect(capitalizeSentence("owed falls to 0", ["owed"])).toBe("The value of owed falls to 0");
  expect(capitalizeSentence("N reaches 40", ["N"])).toBe("N reaches 40");
  expect(capitalizeSentence("ébauche")).toBe("Ébauche");
});

test("sentences are joined with one full stop each", () => {
  expect(joinSentences("Draw down at hour 138", "The stock lasts.", "", undefined)).toBe(
    "Draw down at hour 138. The stock lasts.",
  );
  expect(joinSentences("Is it enough?", "Yes!")).toBe("Is it enough? Yes!");
  expect(joinSentences("The debt is cleared in month 169..")).toBe("The debt is cleared in month 169.");
});

test("joined sentences never end in two full stops", () => {
  const sentence = fc.stringMatching(/^[A-Z][a-z ]{0,12}[.]{0,1}$/);
  fc.assert(
    fc.property(fc.array(sentence, { minLength: 1, maxLength: 4 }), (sentences) => {
      expect(joinSentences(...sentences)).not.toContain("..");
    }),
    { seed: 20260401, numRuns: 300 },
  );
});
