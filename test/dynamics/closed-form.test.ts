import { expect, test } from "vitest";
import {
  closedForm,
  closedFormAt,
  exactTrajectory,
  guaranteedDigits,
  trajectory,
} from "../../src/dynamics/index.js";
import { recurrence, rules } from "../../src/rule/index.js";

// Source: any textbook of linear recurrences: x_n = 2^(n/2) sin(n pi/4); x_10 = 32. Exact whole numbers.
test("complex roots give a turning closed form", () => {
  const rule = recurrence("x[t+1] = 2*x - 2*x[t-1]");
  const form = closedForm(rule, { initial: { x: [0, 1] } });
  // The first value is x_1.
  expect(closedFormAt(form, 9)["x"]).toBeCloseTo(32, 10);
  expect(form.roots.map(({ re, im }) => [re, Math.abs(im)])).toEqual([
    [expect.closeTo(1, 14), expect.closeTo(1, 14)],
    [expect.closeTo(1, 14), expect.closeTo(1, 14)],
  ]);
  for (let n = 1; n < 40; n++) {
    expect(closedFormAt(form, n - 1)["x"]).toBeCloseTo(2 ** (n / 2) * Math.sin((n * Math.PI) / 4), 4);
  }
  expect(exactTrajectory(rule, { initial: { x: [0, 1] }, periods: 9 }).values["x"]![9]).toBe("32");
});

// Source: any textbook of linear recurrences: x_n = (1 + n) 3^n; x_10 = 649539. Exact whole numbers.
test("a repeated root is known to be repeated", () => {
  const rule = recurrence("x[t+1] = 6*x - 9*x[t-1]");
  const form = closedForm(rule, { initial: { x: [1, 6] } });
  expect(form.roots).toEqual([{ re: 3, im: 0, modulus: 3, times: 2, exact: "3" }]);
  expect(closedFormAt(form, 9)["x"]! / 649539).toBeCloseTo(1, 13);
  expect(form.formulas["x"]).toBe("6*3^t + 3*t*3^t");
  expect(exactTrajectory(rule, { initial: { x: [1, 6] }, periods: 9 }).values["x"]![9]).toBe("649539");
});

// Source: Binet's formula; exact by rounding to about F(70) in doubles.
test("Fibonacci numbers come out of their closed form by rounding up to F(70)", () => {
  const rule = recurrence("F[t+1] = F + F[t-1]");
  const form = closedForm(rule, { initial: { F: [0, 1] } });
  const exact = exactTrajectory(rule, { initial: { F: [0, 1] }, periods: 69 }).values["F"]!;
  for (let n = 1; n <= 70; n++)
    expect(Math.round(closedFormAt(form, n - 1)["F"]!)).toBe(Number(exact[n - 1]));
});

test("an affine rule with a = 1 has a repeated root 1", () => {
  const form = closedForm(recurrence("x[t+1] = a*x + b"), {
    parameters: { a: 1, b: 2.5 },
    initial: { x: 4 },
  });
  expect(form.roots).toEqual([{ re: 1, im: 0, modulus: 1, times: 2, exact: "1" }]);
  expect(form.formulas["x"]).toBe("4 + (5/2)*t");
});

// Source: Beverton and Holt's closed form K/(1 + (K/x0 - 1) R^-t), printed to 10 decimals: 1e-11 relative.
test("the Beverton-Holt rule has its closed form", () => {
  const options = { parameters: { R: 1.5, K: 1000 }, initial: { N: 10 } };
  const form = closedForm(rules.bevertonHolt(), options);
  const run = trajectory(rules.bevertonHolt(), { ...options, periods: 50 });
  const printed = [
    [1, 14.9253731343],
    [5, 71.2401055409],
    [10, 368.0785413745],
    [20, 971.0886163615],
    [50, 999.9998447355],
  ] as const;
  for (const [t, value] of printed) {
    expect(Math.abs(closedFormAt(form, t)["N"]! / value - 1)).toBeLessThan(1e-11);
    expect(Math.abs(run.values["N"]![t]! / value - 1)).toBeLessThan(1e-11);
  }
  expect(form.agreement.largest).toBeLessThan(1e-13);
});

// Source: closed form x_t = K (x0/K)^(a^t) of x' = x^a K^(1-a), printed to 12 decimals.
test("the Gompertz rule has its closed form", () => {
  const a = 0.7;
  const form = closedForm(rules.gompertz(), {
    parameters: { a: (1 - a) * Math.log(500), b: a },
    initial: { N: 10 },
  });
  expect(closedFormAt(form, 5)["N"]! / 259.074170139958 - 1).toBeCloseTo(0, 12);
  expect(closedFormAt(form, 20)["N"]! / 498.441687488129 - 1).toBeCloseTo(0, 12);
});

// Source: sin^2(1024 asin sqrt 0.3) for x' = 4x(1 - x), printed to 13 decimals; 1e-11.
test("the chaotic quadratic rule has its closed form, and says how soon digits are lost", () => {
  // x = 3N/(4K): N = 0.3 and K = 0.75 make the map x' = 4x(1 - x).
  const options = { parameters: { r: 3, K: 0.75 }, initial: { N: 0.3 } };
  const form = closedForm(rules.logistic(), options);
  expect(closedFormAt(form, 10)["N"]).toBeCloseTo(0.0434218534453, 11);
  const run = trajectory(rules.logistic(), { ...options, periods: 10 });
  expect(run.values["N"]![10]).toBeCloseTo(0.0434218534453, 11);
  // One bit is lost a step: of 53, about 33 are needed for 10 digits.
  expect(form.guaranteed.periods).toBeGreaterThan(8);
  expect(form.guaranteed.periods).toBeLessThan(25);
});

// Source: doubles against exact fractions, worked out here for every step that is promised.
test("digits that are guaranteed are right", () => {
  const rule = recurrence("x[t+1] = 3.9*x*(1 - x)");
  const { periods } = guaranteedDigits(rule, { initial: { x: 0.5 }, digits: 11 });
  expect(periods).toBeGreaterThan(1);
  const exact = exactTrajectory(recurrence("x[t+1] = a*x*(1 - x)"), {
    parameters: { a: "3.9" },
    initial: { x: "0.5" },
    periods: Math.min(periods, 9),
  });
  const stepped = trajectory(rule, { initial: { x: 0.5 }, periods: 9 }).values["x"]!;
  exact.numbers["x"]!.forEach((value, t) => {
    expect(Math.abs(stepped[t]! - value)).toBeLessThanOrEqual(0.5e-11 * value * 1.01);
  });
});

// Source: half-life algebra, A' = q A + D: printed to 9 decimals.
test("repeated dosing reaches its peak and trough", () => {
  const rho = 2 ** (-8 / 6);
  expect(rho).toBeCloseTo(0.396850262992, 12);
  const form = closedForm(rules.dosing(), { parameters: { rho, D: 500 }, initial: { M: 500 } });
  expect(closedFormAt(form, 200)["M"]).toBeCloseTo(828.981543589, 8);
  expect(closedFormAt(form, 200)["M"]! - 500).toBeCloseTo(328.981543589, 8);
});

// Source: the same algebra with the interval equal to the half-life: the n-th peak is D(2 - 2^(1 - n)), exact.
test("dosing once a half-life doubles the dose in the long run", () => {
  const form = closedForm(rules.dosing(), { parameters: { rho: 0.5, D: 500 }, initial: { M: 500 } });
  for (let n = 1; n <= 20; n++)
    expect(closedFormAt(form, n - 1)["M"]).toBeCloseTo(500 * (2 - 2 ** (1 - n)), 10);
});

test("where no closed form is known it is said so", () => {
  expect(() =>
    closedForm(rules.ricker(), { parameters: { r: 1, K: 10 }, initial: { N: 1 } }),
  ).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: Ricker has no closed form that is known here for these parameters. Step it with path; equilibria and cycles say where it goes in the long run.]`,
  );
});

test("parameters outside a named rule's range are refused with the condition", () => {
  expect(() =>
    closedForm(rules.bevertonHolt(), { parameters: { R: 0.8, K: 10 }, initial: { N: 1 } }),
  ).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: Beverton-Holt: the logistic curve sampled at equal steps means what it says only where R > 1; given were R = 0.8. Choose values inside the range, or write the rule out with recurrence to run it regardless.]`,
  );
});
