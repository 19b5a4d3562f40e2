// Settings chosen under the chance that was given, against exact values.
import { describe, expect, test } from "vitest";
import { optimize, sensitivity, solveFor, tradeoff } from "../../src/decision/index.js";
import { recurrence } from "../../src/rule/index.js";

describe("one delivery a day against Poisson demand of mean 100, 1 for each left over and 9 for each short", () => {
  // Source: the critical ratio .9 of the newsvendor is met first at 113; expected costs 17.905 there, 17.977 at 112,
  // 18.000 at 114 and 39.861 at 100 (SciPy, sums over the Poisson distribution).
  const rule = recurrence("cost = 1*max(0, upto - d) + 9*max(0, d - upto)\nd[t+1] = m", {
    fixed: { m: 100 },
  });
  // The first day meets the demand that is given, 100.
  const asked = {
    parameters: { upto: 100 },
    initial: { d: 100 },
    noise: { d: { distribution: "poisson" } },
    periods: 41,
    vary: "upto",
  } as const;
  const cost = { average: "cost", from: 2 } as const;

  test("is cheapest at 113, in whole pieces", () => {
    const found = optimize(rule, { ...asked, paths: 8000, range: [80, 140], multiple: 1, minimize: cost });
    expect(found.value).toBe(113);
    expect(found.achievedError).toBeGreaterThan(0);
    expect(Math.abs(found.achieved - 17.905)).toBeLessThan(4.5 * found.achievedError);
    const [row] = tradeoff(rule, { ...asked, paths: 8000, values: [113], answers: { cost } }).rows;
    expect(row!.answers["cost"]).toBe(found.achieved);
    expect(found.sentence).toMatch(
      /^The average of cost from period 2 ahead on is smallest, 17\.9\d? \(Monte-Carlo error 0\.0\d\), with upto at 113, /,
    );
  });

  test("costs 39.86 at the mean demand, which no search without chance would tell", () => {
    const [row] = tradeoff(rule, { ...asked, values: [100], answers: { cost } }).rows;
    expect(Math.abs(row!.answers["cost"]! - 39.861)).toBeLessThan(4.5 * row!.errors["cost"]!);
  });

  test("is solved for its cost: the two levels at which it is 39.86", () => {
    // Source: the same sums are 39.861 at 100 and at 139.859 (SciPy, root of the sums).
    const found = solveFor(rule, { ...asked, range: [90, 150], until: { ...cost, is: 39.861 } });
    expect(found.solutions).toHaveLength(2);
    expect(Math.abs(found.solutions[0]!.value - 100)).toBeLessThan(0.1);
    expect(Math.abs(found.solutions[1]!.value - 139.86)).toBeLessThan(0.2);
  });
});

test("the smallest stock for 98% of weeks is the quantile of the demand of three weeks", () => {
  // Source: negative-binomial demand of mean 20 and size 6 adds up, over three weeks, to one of mean 60 and size 18:
  // P(D <= 96) = .97870, P(D <= 97) = .98097 (SciPy).
  const rule = recurrence("net = upto - d - d[t-1] - d[t-2]\nd[t+1] = m");
  const asked = {
    parameters: { upto: 90, m: 20 },
    initial: { d: [20, 20, 20] },
    noise: { d: { distribution: "negative-binomial", size: 6 } },
    periods: 60,
    vary: "upto",
    range: [60, 160],
    multiple: 1,
  } as const;
  const served = { share: "net", risesTo: 0, from: 4 } as const;
  const found = solveFor(rule, { ...asked, paths: 8000, until: { ...served, atLeast: 0.98 } });
  expect(found.solutions.map(({ value }) => value)).toEqual([97]);
  expect(Math.abs(found.solutions[0]!.achieved - 0.98097)).toBeLessThan(
    4.5 * found.solutions[0]!.achievedError,
  );
  expect(found.sentence).toMatch(
    /^With upto at or above 97, the share of periods with net at or above 0 from period 4 ahead on is 98\.\d+% \(Monte-Carlo error 0\.0\d%\), provided/,
  );
});

test("a quantile over the paths is asked for by name", () => {
  // Source: after 9 steps a walk in normal steps of sd 2 from 50 is normal of mean 50 and sd 6: 90% quantile 57.6893.
  const rule = recurrence("x[t+1] = x + c");
  const asked = {
    parameters: { c: 0 },
    initial: { x: 50 },
    noise: { x: { distribution: "normal", sd: 2 } },
    periods: 9,
    paths: 20_000,
  } as const;
  const high = { level: "x", at: 9, quantile: 0.9 } as const;
  const [row] = tradeoff(rule, { ...asked, vary: "c", values: [0], answers: { high } }).rows;
  expect(Math.abs(row!.answers["high"]! - 57.6893)).toBeLessThan(4.5 * row!.errors["high"]!);
  const solved = solveFor(rule, { ...asked, vary: "c", range: [-2, 2], until: { ...high, is: 48.6893 } });
  expect(Math.abs(solved.solutions[0]!.value + 1)).toBeLessThan((4.5 * row!.errors["high"]!) / 9);
  expect(solved.sentence).toContain("the 90% quantile of x 9 periods ahead is 48.69 (Monte-Carlo error 0.0");
  expect(() =>
    tradeoff(rule, { ...asked, vary: "c", values: [0], answers: { a: { ...high, quantile: 90 } } }),
  ).toThrow("The `quantile` of a measure must be between 0 and 1; 90 was given: write `quantile: 0.9`.");
});

test("a time under chance is the median over the paths, and never where fewer than half get there", () => {
  const rule = recurrence("x[t+1] = x + c");
  const asked = {
    parameters: { c: 1 },
    initial: { x: 0 },
    noise: { x: { distribution: "normal", sd: 0.2 } },
    periods: 12,
    vary: "c",
  } as const;
  const { rows, measures, sentence } = tradeoff(rule, {
    ...asked,
    values: [1, 0.5],
    answers: { when: { time: "x", risesTo: 10 } },
  });
  expect(rows[0]!.answers["when"]).toBeGreaterThan(9.5);
  expect(rows[0]!.answers["when"]).toBeLessThan(10.2);
  expect(rows[0]!.errors["when"]).toBeGreaterThan(0);
  expect(rows[1]!.answers["when"]).toBe(Number.POSITIVE_INFINITY);
  expect(measures["when"]).toBe("the median time at which x rises to 10");
  expect(sentence).toMatch(/with c at 0\.5: when never within the projection\.$/);
});

describe("how an answer moves under chance", () => {
  const rule = recurrence("S[t+1] = S - d", { bounds: { S: [0, Number.POSITIVE_INFINITY] } });
  const asked = {
    parameters: { d: 10 },
    initial: { S: 100 },
    noise: { S: { distribution: "normal", sd: 5 } },
    periods: 10,
  } as const;

  test("is said for a probability too, with the error of the difference", () => {
    const found = sensitivity(rule, { ...asked, answer: { probability: "S", fallsTo: 0 } });
    const [row] = found.rows;
    const ends = tradeoff(rule, {
      ...asked,
      vary: "d",
      values: [9, 11],
      answers: { out: { probability: "S", fallsTo: 0 } },
    });
    expect([row!.tenthLower, row!.tenthUpper]).toEqual(ends.rows.map(({ answers }) => answers["out"]));
    expect(row!.tenthError).toBeGreaterThan(0);
    // The same paths are met on both sides, so the difference is known better than its two ends.
    expect(row!.tenthError).toBeLessThan(Math.hypot(...ends.rows.map(({ errors }) => errors["out"]!)));
    expect(row!.elasticity).toBeCloseTo((row!.tenthUpper - row!.tenthLower) / 0.2 / found.answer, 12);
    expect(found.sentence).toContain("(Monte-Carlo error of the difference ");
  });
});

describe("a measure that jumps over its target", () => {
  const rule = recurrence("x[t+1] = floor(q)*10 + 0*x", { parameters: ["q"] });
  const asked = { vary: "q", parameters: { q: 1 }, initial: { x: 0 }, periods: 3, range: [1, 20] } as const;

  test("is reported by its two sides, and not as a solution", () => {
    // Source: 10 floor(q) is 50 below q = 6 and 60 from there on.
    const found = solveFor(rule, { ...asked, until: { level: "x", at: 2, is: 55 } });
    expect(found.solutions).toEqual([]);
    expect(found.jumps).toHaveLength(1);
    const { below, above } = found.jumps[0]!;
    expect([below.achieved, above.achieved]).toEqual([50, 60]);
    expect(above.value).toBe(6);
    expect(6 - below.value).toBeLessThan(1e-12);
    expect(found.sentence).toBe(
      "No q meets the target exactly there: x 2 periods ahead jumps over 55, from 50 with q just below 6 to 60 with q from 6.",
    );
  });

  test("has a limit where it is to be at least the target", () => {
    const found = solveFor(rule, { ...asked, until: { level: "x", at: 2, atLeast: 55 } });
    expect(found.solutions).toHaveLength(1);
    expect(found.solutions[0]).toMatchObject({ value: 6, achieved: 60, meets: "this value and above" });
  });

  test("is met where the target is one of its values", () => {
    const found = solveFor(rule, { ...asked, until: { level: "x", at: 2, is: 60 } });
    expect(found.jumps).toEqual([]);
    expect(found.solutions.every(({ achieved }) => achieved === 60)).toBe(true);
  });
});

test("paths that leave the range of a state are counted, and every sentence that does without them says so", () => {
  const rule = recurrence("S[t+1] = S - d", {
    bounds: { S: { range: [0, Number.POSITIVE_INFINITY], atBounds: "error" } },
  });
  const asked = {
    parameters: { d: 12 },
    initial: { S: 100 },
    noise: { S: { distribution: "normal", sd: 5 } },
    periods: 10,
    paths: 2000,
    vary: "d",
  } as const;
  const end = { level: "S", at: 10 } as const;
  const { rows, sentence } = tradeoff(rule, { ...asked, values: [8, 30], answers: { end } });
  expect(Math.abs(rows[0]!.left - 0.1034)).toBeLessThan(4.5 * Math.sqrt((0.1 * 0.9) / 2000));
  expect(rows[1]!).toMatchObject({ left: 1, answers: { end: Number.NaN } });
  expect(sentence).toMatch(
    /with d at 30: end not known, as no path stays within its range\. 100\.0% of the paths with d at 30 leave the range of a state: a mean is that of the others, and they count as not getting to a level\.$/,
  );
  expect(sentence).not.toContain("NaN");
  const solved = solveFor(rule, { ...asked, range: [4, 9], until: { ...end, is: 40 } });
  expect(solved.sentence).toMatch(/% of the paths leave the range of a state: /);
});
