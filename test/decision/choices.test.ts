import { describe, expect, test } from "vitest";
import { optimize, sensitivity, tradeoff } from "../../src/decision/index.js";
import { fit } from "../../src/estimate/index.js";
import { recurrence } from "../../src/rule/index.js";
import { cultureRecord } from "./harbour-records.js";

describe("the largest sustained yield", () => {
  const yieldAt = { level: "catch", at: 600 } as const;

  test("of the Beverton-Holt rule with R 2 and K 1000", () => {
    // Source: N* = K/(R-1)(sqrt R - 1) = 414.213562373, yield K/(R-1)(sqrt R - 1)^2 = 171.572875254 (Beverton and Holt 1957;
    // closed form, twelve digits). Here the catch is taken as a share h of the grown stock, so that N is the stock left to
    // grow. A peak is flat: its height holds to rounding, its place to half the digits.
    const rule = recurrence("catch = h*R*N/(1 + (R - 1)*N/K)\nN[t+1] = R*N/(1 + (R - 1)*N/K) - catch");
    const found = optimize(rule, {
      vary: "h",
      range: [0.01, 0.49],
      parameters: { h: 0.1, R: 2, K: 1000 },
      initial: { N: 400 },
      periods: 600,
      maximize: yieldAt,
    });
    expect(found.achieved).toBeCloseTo(171.572875254, 7);
    const left = (found.achieved * (1 - found.value)) / found.value;
    expect(Math.abs(left / 414.213562373 - 1)).toBeLessThan(1e-6);
    expect(found.atEnd).toBe(false);
    const [narrow, wide] = found.flatness;
    expect(narrow!.from).toBeGreaterThan(wide!.from);
    expect(narrow!.to).toBeLessThan(wide!.to);
  });

  test("of the Ricker rule with r 1 and K 1000", () => {
    // Source: S 432.8567095902, yield 330.3661247617, harvest rate .4328567096: u = W(e^(1-r)), S = K(1-u)/r (Ricker 1954 with
    // the Lambert function; general-purpose arithmetic).
    const rule = recurrence("catch = h*S*exp(r*(1 - S/K))\nS[t+1] = S*exp(r*(1 - S/K)) - catch");
    const found = optimize(rule, {
      vary: "h",
      range: [0.05, 0.6],
      parameters: { h: 0.3, r: 1, K: 1000 },
      initial: { S: 500 },
      periods: 600,
      maximize: yieldAt,
    });
    expect(found.achieved).toBeCloseTo(330.3661247617, 7);
    expect(found.value).toBeCloseTo(0.4328567096, 6);
  });

  test("at an end of the range is said to be there", () => {
    const found = optimize(recurrence("x[t+1] = x + c"), {
      vary: "c",
      range: [0, 5],
      parameters: { c: 1 },
      initial: { x: 0 },
      periods: 4,
      maximize: { level: "x", at: 4 },
    });
    expect(found.value).toBe(5);
    expect(found.sentence).toBe(
      "The value of x 4 periods ahead is largest, 20, with c at 5, and within 1% of that from 4.95 to 5; that is an end of the range 0 to 5, so a wider range may hold a better one, provided the rule x[t+1] = x + c and its parameters hold.",
    );
  });
});

test("the elasticities of the time to a density are those of its closed form", () => {
  // Source: the same record fitted in R 4.2; elasticities of t = ln(A(K-N0)/(N0(K-A)))/r: K -.248, N0 -.229, r -1, printed to
  // three digits.
  const rule = recurrence("N[t+1] = K*N/(N + (K - N)*exp(-r/2))", {
    bounds: { r: [0, Infinity], K: [0, Infinity] },
    start: { r: 0.5 },
  });
  const fitted = fit(rule, cultureRecord(), { errors: "observation", distribution: "lognormal" });
  const found = sensitivity(fitted, { periods: 10, answer: { time: "N", risesTo: 0.8 } });
  const elasticity = (name: string): number => found.rows.find((row) => row.name === name)!.elasticity;
  expect(elasticity("K")).toBeCloseTo(-0.248, 3);
  expect(elasticity("N[0]")).toBeCloseTo(-0.229, 3);
  expect(elasticity("r")).toBeCloseTo(-1, 5);
  expect(found.rows[0]!.name).toBe("r");
  expect(found.answer).toBeCloseTo(8.145, 3);
  expect(found.sentence).toMatch(
    /^N rises to 0\.8 at hour 8\.14\d+; it is most sensitive to r: ten per cent lower and higher give hour 9\.05\d* and hour 7\.40\d*, about 1\.0% for each 1%\. What the record leaves open matters most through /,
  );
});

test("a table of choices shows time, level and risk of each setting, with the Monte-Carlo error", () => {
  const rule = recurrence("stock[t+1] = stock + ordered - used", { units: { stock: "coils" } });
  const found = tradeoff(rule, {
    vary: "ordered",
    values: { from: 9, to: 11, count: 3 },
    parameters: { ordered: 10, used: 10 },
    initial: { stock: 20 },
    periods: 30,
    noise: { stock: { distribution: "normal", sd: 3 } },
    answers: {
      "runs out": { probability: "stock", fallsTo: 0 },
      "on average": { average: "stock" },
      lowest: { lowest: "stock", from: 2, to: 10 },
    },
  });
  const risks = found.rows.map((row) => row.answers["runs out"]!);
  expect(risks[0]!).toBeGreaterThan(risks[1]!);
  expect(risks[1]!).toBeGreaterThan(risks[2]!);
  expect(found.rows[1]!.errors["runs out"]).toBeCloseTo(Math.sqrt((risks[1]! * (1 - risks[1]!)) / 4000), 12);
  // Source: the mean of a linear rule under additive noise is its path without noise: 20 - 15.5, 20, 20 + 15.5.
  for (const [i, exact] of [4.5, 20, 35.5].entries()) {
    const { answers, errors } = found.rows[i]!;
    expect(Math.abs(answers["on average"]! - exact)).toBeLessThan(4.5 * errors["on average"]!);
    expect(answers["lowest"]!).toBeLessThan(20 + 2 * (i - 1));
  }
  expect(found.sentence).toMatch(
    /^With ordered at 9: runs out \d+%, on average [45]\.\d+ coils, lowest [\d.]+ coils; with ordered at 11: runs out 0\.\d%, on average 3[56]\.\d+ coils, lowest [\d.]+ coils\.$/,
  );
});

test.each([
  ["a catch of 80", "catch = min(B, c)", "c", 80, 0.544, 66.3],
  ["a share h .16", "catch = h*B", "h", 0.16, 0.23, 85.3],
])("%s a year has the risk and the mean yield of 200,000 runs", (_, line, setting, value, risk, mean) => {
  // Source: 200,000 runs in a general-purpose program; risk of a stock below 200 at any of 30 year-ends to a thousandth
  // (stated tolerance .004), mean yield of those years to a tenth (half a unit, and 4 Monte-Carlo errors).
  const rule = recurrence(`${line}\nB[t+1] = max(B + r*B*(1 - B/K) - catch, 0)`);
  const found = tradeoff(rule, {
    vary: setting,
    values: [value],
    parameters: { r: 0.4, K: 1000, [setting]: value },
    initial: { B: 600 },
    periods: 30,
    noise: { B: { distribution: "lognormal", sd: 0.25, centre: "mean" } },
    paths: 60_000,
    answers: { risk: { probability: "B", fallsTo: 200 }, yield: { average: "catch" } },
  });
  const [{ answers, errors }] = found.rows as [(typeof found.rows)[number]];
  expect(Math.abs(answers["risk"]! - risk)).toBeLessThan(0.004 + 2 * errors["risk"]!);
  expect(Math.abs(answers["yield"]! - mean)).toBeLessThan(0.05 + 4 * errors["yield"]!);
});

test("choices without an objective, or between nothing, are refused", () => {
  const rule = recurrence("x[t+1] = x + c");
  const given = { parameters: { c: 1 }, initial: { x: 0 }, periods: 4 };
  expect(() => optimize(rule, { ...given, vary: "c", range: [0, 1] })).toThrow(
    'Give one of `maximize` and `minimize`, with a measure, such as maximize: { total: "yield" }.',
  );
  expect(() => tradeoff(rule, { ...given, vary: "c", values: [], answers: {} })).toThrow(
    "A table of choices needs at least one setting in `values` and one measure in `answers`.",
  );
  expect(() => sensitivity(rule, { ...given, answer: { level: "y", at: 1 } })).toThrow(
    'The projection has no state or quantity "y". It has: x.',
  );
});
