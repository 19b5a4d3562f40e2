import { describe, expect, test } from "vitest";
import { type SolveOptions, solveFor, timeToReach, tradeoff } from "../../src/decision/index.js";
import { fit } from "../../src/estimate/index.js";
import { forecast } from "../../src/projection/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";

const store = recurrence("stock[t+1] = stock - issued", {
  inputs: ["issued"],
  units: { stock: "t", issued: "t" },
});
const ask = (until: SolveOptions["until"], more: Partial<SolveOptions> = {}) =>
  solveFor(store, {
    initial: { stock: 488 },
    periods: 10,
    ...("probability" in until && { noise: { stock: { distribution: "normal", sd: 0.5 } }, paths: 400 }),
    vary: "issued",
    range: [5, 10],
    until,
    ...more,
  });

// Source of all expected values: stock after n periods is 488 - n issued, by subtraction.
describe("a target that every setting meets", () => {
  test("is said to be met everywhere, with the risk", () => {
    const found = ask({ probability: "stock", fallsTo: 100, atMost: 0.05 });
    expect(found.solutions).toEqual([]);
    expect(found.everywhere).toEqual([0, 0]);
    expect(found.sentence).toBe(
      "Every issued looked at from 5 to 10 t meets the target: the probability that stock falls to 100 t is 0% throughout (simulated), provided issued goes as planned and the rule stock[t+1] = stock - issued holds.",
    );
  });

  test("is said with the span of what is brought about", () => {
    const found = ask({ level: "stock", at: 10, atLeast: 300 });
    expect(found.everywhere).toEqual([388, 438]);
    expect(found.sentence).toContain("stock 10 periods ahead is from 388 t to 438 t,");
  });

  test("and one that none meets has its risk said", () => {
    expect(ask({ probability: "stock", fallsTo: 480, atMost: 0.05 }).sentence).toBe(
      "No issued looked at from 5 to 10 t brings the probability that stock falls to 480 t to the target: it is 100% throughout (simulated).",
    );
  });
});

test("what is past at the start already is said", () => {
  const past = "stock begins at 488 t, already at or below 600 t";
  expect(() => ask({ time: "stock", fallsTo: 600, atLeast: 5 })).toThrow(past);
  expect(() => ask({ probability: "stock", fallsTo: 600, atMost: 0.05 })).toThrow(past);
});

test("a risk in percent is refused with the share to write", () => {
  expect(() => ask({ probability: "stock", fallsTo: 0, atMost: 5 })).toThrow(
    "A probability is from 0 to 1: write 0.05 for 5%.",
  );
});

test("a limit is rounded to the side that meets the target", () => {
  // 488 - 4 issued = 3.8 at 121.05, which to four digits would be 121.1 or 121.0.
  const until = { level: "stock", at: 4 } as const;
  const between = [50, 200] as const;
  expect(ask({ ...until, atLeast: 3.8 }, { range: between }).sentence).toContain("issued at or below 121 t,");
  expect(ask({ ...until, atMost: 3.8 }, { range: between }).sentence).toContain(
    "issued at or above 121.1 t,",
  );
  expect(ask({ ...until, atLeast: 88 }, { range: between }).sentence).toContain("issued at or below 100 t,");
});

test("a time that is not to come too soon is said by its limit", () => {
  const until = { time: "stock", fallsTo: 244, atLeast: 8 } as const;
  expect(ask(until, { range: [5, 60] }).sentence).toContain("stock falls to 244 t not before period 8,");
});

test("an answer read from below zero, where no record was, says so", () => {
  const index = [488, 470, 455, 437, 420, 404, 385, 371, 352, 337];
  const t = index.map((_, at) => at);
  const record = observations(tableOf({ t, index, landed: t.map(() => 17) }), {
    period: "t",
    step: { every: 1, of: "year" },
    value: "index",
    inputs: ["landed"],
  });
  const fitted = fit(recurrence("index[t+1] = index*s - landed", { inputs: ["landed"] }), record, {
    errors: "process",
  });
  const scenarios = { usual: { landed: 17 }, high: { landed: 100 } };
  const ahead = forecast(fitted, { periods: 6, scenarios, paths: 200 });
  const warning = /By year 15 the rule gives index = -\d+(\.\d)? under "high"/;
  expect(timeToReach(ahead, { risesTo: 500 }).sentence).toMatch(warning);
  expect(timeToReach(ahead, { fallsTo: 300 }).sentence).not.toMatch(warning);
  const compared = tradeoff(fitted, {
    vary: "landed",
    values: [17, 100],
    periods: 6,
    answers: { index: { level: "index", at: 6 } },
    paths: 200,
  });
  expect(compared.sentence).toMatch(/By year 15 the rule gives index = -\d+(\.\d)? under "landed 100": no/);
  const solved = solveFor(fitted, {
    vary: "landed",
    range: [10, 200],
    periods: 6,
    until: { level: "index", at: 6, is: -50 },
  });
  expect(solved.sentence).toMatch(/By year 15 the rule gives index = -(49\.9|50\.)/);
  const kept = solveFor(fitted, {
    vary: "landed",
    range: [10, 200],
    periods: 6,
    until: { level: "index", at: 6, is: 0 },
  });
  expect(kept.sentence).not.toContain("no record");
});
