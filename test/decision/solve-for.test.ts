import { describe, expect, test } from "vitest";
import { solveFor, timeToReach } from "../../src/decision/index.js";
import { fit } from "../../src/estimate/index.js";
import { normalCdf, normalQuantile } from "../../src/numeric/index.js";
import { forecast } from "../../src/projection/index.js";
import { recurrence } from "../../src/rule/index.js";
import { cultureRecord } from "./harbour-records.js";

const loan = recurrence(
  "interest = i*owed\npaid = min(payment[t+1], owed + interest)\nowed[t+1] = owed + interest - paid",
  { inputs: ["payment"], units: { payment: "EUR", owed: "EUR" } },
);
const ferry = { parameters: { i: 0.0035 }, initial: { owed: 240_000 }, periods: 320 };

describe("a loan", () => {
  // Source: p = i B0/(1 - (1+i)^-n), the level-payment formula of any text on the theory of interest; 300 months at .35% a month.
  const level = (0.0035 * 240_000) / (1 - 1.0035 ** -300);

  test("is cleared in a month by the level payment, and by any larger one", () => {
    const found = solveFor(loan, {
      ...ferry,
      vary: "payment",
      range: [900, 3000],
      until: { level: "owed", at: 300, atMost: 0 },
    });
    expect(found.solutions).toHaveLength(1);
    expect(found.solutions[0]!.exact / level).toBeCloseTo(1, 9);
    expect(found.solutions[0]!.meets).toBe("this value and above");
  });

  test("takes a payment in whole cents that is enough, not one short", () => {
    const found = solveFor(loan, {
      ...ferry,
      vary: "payment",
      range: [900, 3000],
      multiple: 0.01,
      until: { time: "owed", fallsTo: 0, atMost: 300 },
    });
    expect(found.solutions[0]!.value).toBe(Math.ceil(level * 100) / 100);
    expect(found.solutions[0]!.achieved).toBe(300);
    expect(found.sentence).toBe(
      "With payment at or above 1293.47 EUR, owed falls to 0 EUR at period 300, provided payment goes as planned and the rule and its parameters hold.",
    );
  });

  test("is not cleared by a payment below the interest, and the nearest miss is said", () => {
    const found = solveFor(loan, {
      ...ferry,
      vary: "payment",
      range: [100, 800],
      until: { level: "owed", at: 300, is: 0 },
    });
    expect(found.solutions).toEqual([]);
    expect(found.sentence).toMatch(
      /^No payment from 100 to 800 EUR brings owed 300 periods ahead to the target: the nearest is \d+ EUR with payment at 800 EUR\.$/,
    );
  });
});

test("two starts give the same level a period on, and both are told", () => {
  // Source: x + r x (1 - x/K) = y is a quadratic in x: r .5, K 1000, y 550: x^2/2000 - 1.5x + 550 = 0.
  const rule = recurrence("N[t+1] = N + r*N*(1 - N/K)");
  const root = Math.sqrt(1.5 ** 2 - (4 * 550) / 2000);
  const found = solveFor(rule, {
    parameters: { r: 0.5, K: 1000 },
    initial: { N: 500 },
    periods: 1,
    vary: "N[0]",
    range: [0, 3000],
    until: { level: "N", at: 1, is: 550 },
  });
  expect(found.solutions.map((each) => each.value)).toHaveLength(2);
  expect(found.solutions[0]!.value).toBeCloseTo((1.5 - root) * 1000, 6);
  expect(found.solutions[1]!.value).toBeCloseTo((1.5 + root) * 1000, 6);
  expect(found.sentence).toMatch(/^2 settings meet the target: With N\[0\] at /);
});

test("the stock that keeps the risk of running out at 2% is the quantile of one week's demand", () => {
  // Source: P(x0 - d < 0) = 2% for d normal of mean 40 and sd 5 gives x0 = 40 + 2.053749 * 5 (handbook table of the normal, z .98).
  // The whole piece above that, at which 1 - Phi(2.2) run out; tolerance 4.5 Monte-Carlo errors.
  const rule = recurrence("stock[t+1] = stock - demand", { units: { stock: "pieces" } });
  const found = solveFor(rule, {
    parameters: { demand: 40 },
    initial: { stock: 60 },
    periods: 1,
    noise: { stock: { distribution: "normal", sd: 5 } },
    paths: 40_000,
    vary: "stock[0]",
    range: [20, 100],
    multiple: 1,
    until: { probability: "stock", fallsTo: 0, atMost: 0.02 },
  });
  const exact = 40 + normalQuantile(0.98) * 5;
  expect(found.solutions[0]!.value).toBe(Math.ceil(exact));
  const above = 1 - normalCdf((51 - 40) / 5);
  expect(Math.abs(found.solutions[0]!.achieved - above)).toBeLessThan(
    4.5 * found.solutions[0]!.achievedError,
  );
  expect(found.sentence).toMatch(
    /^With stock\[0\] at or above 51 pieces, the probability that stock falls to 0 pieces is 1\.\d+% \(Monte-Carlo error 0\.0\d%\), provided the rule stock\[t\+1\] = stock - demand and its parameters hold\.$/,
  );
});

test("a fit's answer has an interval, and solving it back gives the target", () => {
  const rule = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)", {
    bounds: { R: [1, Infinity], K: [0, Infinity] },
  });
  const fitted = fit(rule, cultureRecord(), { errors: "observation", distribution: "lognormal" });
  const found = solveFor(fitted, {
    periods: 20,
    vary: "N[0]",
    until: { time: "N", risesTo: 0.8, is: 6 },
    seed: 4,
  });
  const [solution] = found.solutions;
  // Source: closed form N0 = K A/(A + (K - A) R^t) at the fit's estimates, t = 12 half hours.
  const [R, K] = ["R", "K"].map((name) => fitted.groups[0]!.parameters[name]!) as [number, number];
  expect(solution!.value).toBeCloseTo((K * 0.8) / (0.8 + (K - 0.8) * R ** 12), 9);
  expect(solution!.margin!.lower!).toBeLessThan(solution!.value);
  expect(solution!.margin!.upper!).toBeGreaterThan(solution!.value);
  expect(found.sentence).toMatch(
    /^With N\[0\] at 0\.0\d+ \(95% interval 0\.0\d+ to 0\.0\d+\), N rises to 0\.8 at hour 6, provided it goes on as in the record of 21 values to hour 10, by the rule N\[t\+1\] = R\*N\/\(1 \+ \(R - 1\)\*N\/K\)\.$/,
  );
  expect(timeToReach(forecast(fitted, { periods: 20 }), { risesTo: 0.8 }).groups[0]!.time).toBeGreaterThan(6);
});

test("what cannot be solved is refused in a whole sentence", () => {
  const ask = (options: object) => () =>
    solveFor(loan, {
      ...ferry,
      vary: "payment",
      range: [900, 3000],
      until: { level: "owed", at: 300, is: 0 },
      ...options,
    } as never);
  expect(ask({ vary: "paymant" })).toThrow(
    'Nothing called "paymant" can be set. There are: i, owed[0], payment. Did you mean "payment"?',
  );
  expect(ask({ range: [3000, 900] })).toThrow(
    "`range` of payment: [3000, 900] cannot be searched, because the first must be the smaller one.",
  );
  expect(ask({ until: { level: "owed", at: 400, is: 0 } })).toThrow(
    "Period 400 ahead was asked for, and the projection has whole periods 1 to 320. Give more `periods`, or an earlier one.",
  );
  expect(ask({ until: { level: "owed", at: 1 } })).toThrow(
    "The target has no value. Give one of `is`, `atMost` and `atLeast` with a finite number.",
  );
  expect(ask({ until: { probability: "owed", fallsTo: 0, atMost: 0.1 } })).toThrow(
    'The probability that owed gets to a level needs a rule with random change. Give it, as in noise: { owed: { distribution: "normal", sd: 1 } }, or ask for a `time` instead.',
  );
  const idle = recurrence("x[t+1] = x + 0*a", { bounds: { a: [0, 5] } });
  const solve = (between: readonly [number, number] | undefined) => () =>
    solveFor(idle, {
      parameters: { a: 0 },
      initial: { x: 1 },
      periods: 3,
      vary: "a",
      ...(between && { range: between }),
      until: { level: "x", at: 3, is: 2 },
    });
  expect(solve(undefined)).toThrow(
    "a has no effect on x 3 periods ahead: it is the same over the whole range.",
  );
  expect(solve([6, 9])).toThrow(
    "`range` of a: [6, 9] cannot be searched, because the rule bounds a to 0 to 5.",
  );
});
