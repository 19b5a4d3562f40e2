// A setting of a fit holds from the record's end: the past is as it was fitted.
import { describe, expect, test } from "vitest";
import { optimize, sensitivity, solveFor, tradeoff } from "../../src/decision/index.js";
import { fit } from "../../src/estimate/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";

/** An invented index of a stock of which catches were taken: 30 years, 18% errors. */
const index = [
  10.439, 11.87, 9.929, 10.145, 8.675, 13.72, 10.189, 12.919, 11.119, 7.178, 10.398, 6.962, 8.403, 6.394,
  6.647, 6.628, 4.727, 4.448, 2.993, 5.517, 4.09, 3.672, 4.696, 5.507, 3.807, 6.698, 5.215, 4.416, 5.542,
  8.362,
];
const caught = [
  74, 111, 135, 162, 192, 224, 252, 267, 284, 315, 359, 397, 378, 411, 461, 362, 419, 375, 325, 297, 227, 268,
  197, 179, 168, 164, 151, 155, 189, 178,
];
const record = observations(tableOf({ year: index.map((_, i) => 1996 + i), index, caught }), {
  period: "year",
  step: { every: 1, of: "year" },
  values: { D: "index" },
  inputs: { C: "caught" },
});
const depleted = recurrence("ΔD = 4*MSY/K*D*(1 - D) - C/K - h*D", {
  inputs: ["C"],
  fixed: { h: 0 },
  bounds: { MSY: [1, 2000], K: [500, 1e5] },
});
const fitted = fit(depleted, record, {
  errors: "observation",
  distribution: "lognormal",
  factor: { D: "scale" },
});
const { MSY, K } = fitted.groups[0]!.parameters as { MSY: number; K: number };

/** The rule by hand: the record's catches without h, then h and no catch. */
function byHand(h: number, years: number): number {
  let D = fitted.groups[0]!.estimates.find(({ name }) => name === "D[0]")!.value;
  const step = (catchOf: number, rate: number): void => {
    D += ((4 * MSY) / K) * D * (1 - D) - catchOf / K - rate * D;
  };
  // The step from the last recorded year takes its catch, and the setting holds from there on.
  for (const C of caught.slice(0, -1)) step(C, 0);
  step(caught.at(-1)!, h);
  for (let year = 1; year < years; year++) step(0, h);
  return D;
}

const asked = { periods: 20, inputs: { C: 0 }, paths: 400 } as const;

describe("a parameter that the fit held at 0", () => {
  const { rows } = tradeoff(fitted, {
    ...asked,
    vary: "h",
    values: [0, 0.05, 0.1, 0.15, 0.2],
    answers: { stock: { level: "D", at: 20 }, low: { probability: "D", fallsTo: 0.2 } },
  });

  test("acts from the record's end on, as the rule does by hand", () => {
    for (const { value, answers } of rows) expect(answers["stock"]).toBeCloseTo(byHand(value, 20), 9);
  });

  test("makes a low stock the likelier the larger it is", () => {
    const chances = rows.map(({ answers }) => answers["low"]!);
    expect([...chances].sort((a, b) => a - b)).toEqual(chances);
    expect(chances[1]).toBeLessThan(0.02);
  });

  test("is found again by solveFor, optimize and sensitivity", () => {
    const half = byHand(0.1, 20);
    const solved = solveFor(fitted, {
      ...asked,
      vary: "h",
      range: [0, 0.3],
      until: { level: "D", at: 20, is: half },
    });
    expect(solved.solutions[0]!.value).toBeCloseTo(0.1, 9);
    expect(solved.solutions[0]!.margin!.lower!).toBeLessThan(0.1);
    expect(solved.solutions[0]!.margin!.upper!).toBeGreaterThan(0.1);
    const best = optimize(fitted, { ...asked, vary: "h", range: [0, 0.3], maximize: { level: "D", at: 20 } });
    expect(best.value).toBe(0);
    expect(best.achieved).toBeCloseTo(byHand(0, 20), 9);
    const moved = sensitivity(fitted, { ...asked, vary: ["h", "K"], answer: { level: "D", at: 20 } });
    expect(moved.answer).toBeCloseTo(byHand(0, 20), 9);
    // What is estimated is moved in the record as well: an error of the estimate would have been there all along.
    const capacity = moved.rows.find(({ name }) => name === "K")!;
    expect(capacity.tenthUpper).not.toBeCloseTo(moved.answer, 6);
  });
});
