// Expected values: fits of the same record by R 4.2.2 (nls, lm, and profiles of the sum of squares), printed to
// ten digits. nls stops at a relative offset of 1e-5, so coefficients and sums hold to 1e-6 and standard errors to 1e-5.
import { describe, expect, test } from "vitest";
import {
  type Estimate,
  type Fit,
  fit,
  forecast,
  leastSquares,
  type Observations,
  observations,
  recurrence,
  timeToReach,
} from "../../kernel-helpers/index.js";
import { yeast } from "./carlson-yeast.js";

const crowding = recurrence("ΔN = r*N*(1 - N/K)");
const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");

const record = (scale = 1, shift = 0): Observations =>
  observations(
    { hour: yeast.map((_, hour) => hour + shift), amount: yeast.map((value) => value * scale) },
    { period: "hour", step: { every: 1, of: "hour" }, value: "amount" },
  );

/** A row ahead of the record, which a rule that does not look at its state ignores: every hour becomes a step. */
const ledByOne = (): Observations =>
  observations(
    { hour: [-1, ...yeast.keys()], amount: [1, ...yeast] },
    { period: "hour", step: { every: 1, of: "hour" }, value: "amount" },
  );

const group = (fitted: Fit): Fit["groups"][number] => fitted.groups[0]!;
const named = (fitted: Fit, name: string): Estimate =>
  group(fitted).estimates.find((estimate) => estimate.name === name)!;
const off = (value: number | undefined, expected: number): number =>
  Math.abs((value ?? Number.NaN) / expected - 1);

describe("Carlson's yeast record", () => {
  const logistic = fit(recurrence("N[t+1] = A/(1 + exp((m - t)/s))"), ledByOne(), { errors: "process" });
  const three = ["A", "m", "s"];

  test("three-parameter logistic curve: estimates, standard errors, RSS and AIC (R nls)", () => {
    const coefficients = [663.0219894, 7.80768758, 1.828171163];
    const errors = [1.702728685, 0.02233745391, 0.01865843903];
    three.forEach((name, i) => {
      expect(off(named(logistic, name).value, coefficients[i]!)).toBeLessThan(1e-6);
      expect(off(named(logistic, name).standardError, errors[i]!)).toBeLessThan(1e-5);
    });
    expect(off(group(logistic).sumOfSquares, 194.3253782)).toBeLessThan(1e-6);
    expect(off(group(logistic).sigma, 3.485015945)).toBeLessThan(1e-6);
    expect(off(group(logistic).criteria!.logLikelihood, -49.04823446)).toBeLessThan(1e-6);
    expect(off(group(logistic).criteria!.aic, 106.0964689)).toBeLessThan(1e-6);
  });

  test("three-parameter logistic curve through leastSquares, without a Jacobian (R nls)", () => {
    const solved = leastSquares({
      residuals: ([A, m, s]) => Float64Array.from(yeast, (y, t) => y - A! / (1 + Math.exp((m! - t) / s!))),
      start: [600, 8, 2],
    });
    [663.0219894, 7.80768758, 1.828171163].forEach((expected, i) => {
      expect(off(solved.estimates[i], expected)).toBeLessThan(1e-6);
    });
    [1.702728685, 0.02233745391, 0.01865843903].forEach((expected, i) => {
      expect(off(solved.standardErrors[i], expected)).toBeLessThan(1e-5);
    });
  });

  test("profile intervals by the F cut-off and Wald intervals by t (R)", () => {
    const profiles = [
      [659.4175335, 666.6682845],
      [7.76040337, 7.855261482],
      [1.788457986, 1.868502206],
    ];
    const walds = [
      [659.4123658, 666.6316129],
      [7.760334293, 7.855040867],
      [1.788617039, 1.867725286],
    ];
    three.forEach((name, i) => {
      const { profile, wald } = named(logistic, name);
      expect(off(profile.lower, profiles[i]![0]!)).toBeLessThan(1e-6);
      expect(off(profile.upper, profiles[i]![1]!)).toBeLessThan(1e-6);
      expect(off(wald?.lower, walds[i]![0]!)).toBeLessThan(1e-6);
      expect(off(wald?.upper, walds[i]![1]!)).toBeLessThan(1e-6);
    });
  });

  test("the Beverton-Holt trajectory is the continuous logistic: R = exp(1/s), N[0] = A/(1 + exp(m/s))", () => {
    const stepped = fit(sheltered, record(), { errors: "observation" });
    const value = (name: string): number => named(logistic, name).value;
    // Both are our own searches to the optimum of one sum of squares: 1e-8 is what the flat optimum leaves.
    expect(off(named(stepped, "K").value, value("A"))).toBeLessThan(1e-8);
    expect(off(named(stepped, "R").value, Math.exp(1 / value("s")))).toBeLessThan(1e-8);
    expect(
      off(named(stepped, "N[0]").value, value("A") / (1 + Math.exp(value("m") / value("s")))),
    ).toBeLessThan(1e-8);
    // R prints r and N0 to seven or eight digits.
    expect(off(Math.log(named(stepped, "R").value), 0.5469947)).toBeLessThan(1e-6);
    expect(off(named(stepped, "N[0]").value, 9.1355167)).toBeLessThan(1e-6);
    expect(off(named(stepped, "K").profile.lower, 659.4175335)).toBeLessThan(1e-6);
    expect(off(named(stepped, "K").profile.upper, 666.6682845)).toBeLessThan(1e-6);
    expect(off(group(stepped).sumOfSquares, 194.3253782)).toBeLessThan(1e-6);
  });

  test("Gompertz and exponential curves, which fit worse (R nls)", () => {
    const curve = leastSquares({
      residuals: ([K, b, r]) => yeast.map((y, t) => y - K! * Math.exp(-b! * Math.exp(-r! * t))),
      start: [600, 8, 0.4],
    });
    [689.2620465, 10.22257318, 0.3458879401].forEach((expected, i) => {
      expect(off(curve.estimates[i], expected)).toBeLessThan(1e-6);
    });
    expect(off(curve.sumOfSquares, 4001.198097)).toBeLessThan(1e-6);
    const growth = fit(recurrence("N[t+1] = R*N"), record(), { errors: "observation" });
    expect(off(named(growth, "N[0]").value, 133.0454161)).toBeLessThan(1e-6);
    expect(off(Math.log(named(growth, "R").value), 0.1016553322)).toBeLessThan(1e-6);
    expect(off(group(growth).sumOfSquares, 242396.3485)).toBeLessThan(1e-6);
    expect(off(group(growth).criteria!.aic, 239.5435836)).toBeLessThan(1e-6);
  });

  test("regression of the log ratio on the level (R lm)", () => {
    const line = fit(recurrence("N[t+1] = N*exp(a + b*N)"), record(), {
      errors: "process",
      distribution: "lognormal",
    });
    expect(off(named(line, "a").value, 0.5217460871)).toBeLessThan(1e-6);
    expect(off(named(line, "b").value, -0.0008031497502)).toBeLessThan(1e-6);
    expect(off(group(line).sumOfSquares, 0.03115844114)).toBeLessThan(1e-6);
    expect(off(-named(line, "a").value / named(line, "b").value, 649.6249136)).toBeLessThan(1e-6);
  });

  test("regression of the change on the level without intercept, and the capacity with its delta-method error (R lm)", () => {
    const line = fit(recurrence("ΔN = r*N + s*N^2"), record(), { errors: "process" });
    expect(off(named(line, "r").value, 0.5576851103)).toBeLessThan(1e-6);
    expect(off(named(line, "r").standardError, 0.02193648142)).toBeLessThan(1e-5);
    expect(off(named(line, "s").value, -0.000852666007)).toBeLessThan(1e-6);
    expect(off(named(line, "s").standardError, 3.679745689e-5)).toBeLessThan(1e-5);
    expect(off(group(line).sumOfSquares, 835.3763431)).toBeLessThan(1e-6);
    const curve = fit(crowding, record(), { errors: "process" });
    expect(off(named(curve, "K").value, 654.0487198)).toBeLessThan(1e-6);
    expect(off(named(curve, "K").standardError, 5.401410159)).toBeLessThan(1e-5);
  });

  test("one-step fit of the Beverton-Holt rule (R nls)", () => {
    const stepped = fit(sheltered, record(), { errors: "process" });
    expect(off(named(stepped, "R").value, 1.730513509)).toBeLessThan(1e-6);
    expect(off(named(stepped, "R").standardError, 0.02308134757)).toBeLessThan(1e-5);
    expect(off(named(stepped, "K").value, 663.0086783)).toBeLessThan(1e-6);
    expect(off(named(stepped, "K").standardError, 4.25888234)).toBeLessThan(1e-5);
    expect(off(group(stepped).sumOfSquares, 318.6343783)).toBeLessThan(1e-6);
  });

  test("trajectory fit of the discrete logistic (R nls)", () => {
    const stepped = fit(crowding, record(), { errors: "observation" });
    // Printed to seven digits from an optimiser that stopped at 1e-5.
    expect(off(named(stepped, "r").value, 0.5603671)).toBeLessThan(1e-5);
    expect(off(named(stepped, "K").value, 652.4635323)).toBeLessThan(1e-5);
    expect(off(named(stepped, "N[0]").value, 14.99976698)).toBeLessThan(1e-5);
    expect(off(group(stepped).sumOfSquares, 1353.516669)).toBeLessThan(1e-6);
  });

  test("forecast at hours 19 and 24, and times at which 95% and 99% of the capacity are reached (closed form)", () => {
    const stepped = fit(sheltered, record(), { errors: "observation" });
    const ahead = forecast(stepped, { periods: 6 });
    const { central } = ahead.groups[0]!.states[0]!;
    expect(off(central[19], 661.5706587)).toBeLessThan(1e-6);
    expect(off(central[24], 662.927611)).toBeLessThan(1e-6);
    const capacity = named(stepped, "K").value;
    const at = (share: number): number | undefined =>
      timeToReach(ahead, { risesTo: share * capacity }).groups[0]!.time;
    // Source: closed form of the same fit, printed to ten digits; between whole hours the rule's path is the logistic curve
    // itself. K comes from a search that stops at a relative 1e-5, which moves the times by less than 1e-6 of themselves.
    expect(off(at(0.95), 13.19062601)).toBeLessThan(1e-6);
    expect(off(at(0.99), 16.20835318)).toBeLessThan(1e-6);
  });

  test.each([
    ["values times 1e-6", 1e-6, 0],
    ["values times 1e6", 1e6, 0],
    ["hours counted from 1913", 1, 1913],
  ])("the same digits with %s", (_, scale, shift) => {
    const plain = fit(sheltered, record(), { errors: "observation" });
    const other = fit(sheltered, record(scale, shift), { errors: "observation" });
    // Ten digits: both stop where the scaled gradient is below 1e-10.
    expect(off(named(other, "R").value, named(plain, "R").value)).toBeLessThan(1e-9);
    expect(off(named(other, "K").value, named(plain, "K").value * scale)).toBeLessThan(1e-9);
    expect(off(named(other, "K").standardError, named(plain, "K").standardError! * scale)).toBeLessThan(1e-8);
    expect(off(named(other, "K").profile.upper, named(plain, "K").profile.upper! * scale)).toBeLessThan(1e-8);
    expect(off(group(other).sumOfSquares, group(plain).sumOfSquares * scale ** 2)).toBeLessThan(1e-9);
  });
});
