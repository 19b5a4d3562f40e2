import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import {
  chiSquareCdf,
  chiSquareQuantile,
  chiSquareUpperTail,
  type Distribution,
  distributions,
  fQuantile,
  fUpperTail,
  normalCdf,
  normalDensity,
  normalQuantile,
  normalUpperTail,
  studentQuantile,
} from "../../src/numeric/index.js";

type Name = keyof typeof distributions;
type Parameters = number[];

// Source: see fixtures/distributions/SOURCE.md.
const values = JSON.parse(
  readFileSync(`${import.meta.dirname}/fixtures/distributions/values.json`, "utf8"),
) as {
  readonly tails: [Name, Parameters, value: number, density: number, lower: number, upper: number][];
  readonly quantiles: [Name, Parameters, probability: number, quantile: number, upperQuantile: number][];
};

const of = (name: Name, parameters: Parameters): Distribution =>
  (distributions[name] as (...values: number[]) => Distribution)(...parameters);

/** Relative; what is 0 must be 0. */
function near(value: number, expected: number, tolerance: number): void {
  const error = Math.abs(value - expected) / Math.max(Math.abs(expected), Number.MIN_VALUE);
  expect(error, `${value} for ${expected}`).toBeLessThan(tolerance);
}

// Tolerance: 12 digits, in tails too.
test.each(values.tails)(
  "%s(%j) at %f has the density and both tails of mpmath",
  (name, parameters, value, ...expected) => {
    const distribution = of(name, parameters);
    const found = [
      distribution.density(value),
      distribution.cumulative(value),
      distribution.upperTail(value),
    ];
    expected.forEach((each, i) => {
      near(found[i]!, each, 1e-12);
    });
  },
);

test.each(values.quantiles)(
  "%s(%j) has the quantiles of SciPy at %f",
  (name, parameters, probability, ...expected) => {
    const distribution = of(name, parameters);
    near(distribution.quantile(probability), expected[0]!, 1e-12);
    near(distribution.upperQuantile(probability), expected[1]!, 1e-12);
  },
);

// The quantile of a tail that mpmath worked out is the value it was worked out for.
test.each(values.tails)(
  "%s(%j) leads from its tails back to %f",
  (name, parameters, value, density, lower, upper) => {
    const distribution = of(name, parameters);
    const tail = Math.min(lower, upper);
    if (tail < 1e-290) return;
    const found = lower <= upper ? distribution.quantile(tail) : distribution.upperQuantile(tail);
    // An error of 1e-13 of the tail moves a value by so much.
    const reach = Math.max(1e-12, (1e-13 * tail) / (density * Math.abs(value) || 1));
    near(found, value, reach);
  },
);

describe("a distribution", () => {
  test("is a plain frozen object that says what it is", () => {
    const { kind, name, parameters } = distributions.negativeBinomial(4, 2);
    expect({ kind, name, parameters }).toEqual({
      kind: "distribution",
      name: "negativeBinomial",
      parameters: { mean: 4, size: 2 },
    });
    expect(Object.isFrozen(distributions.t(3)) && Object.isFrozen(parameters)).toBe(true);
  });

  test("is the standard one where parameters have a usual value", () => {
    expect(distributions.normal().parameters).toEqual({ mean: 0, sd: 1 });
    expect(distributions.lognormal().parameters).toEqual({ meanLog: 0, sdLog: 1 });
    expect(distributions.uniform().parameters).toEqual({ low: 0, high: 1 });
  });

  // Limits of the closed forms: a density at 0 is 0, finite or infinite as the power of x there is above, at or below 0.
  test.each<[Name, Parameters, number, number]>([
    ["gamma", [1, 4], 0, 0.25],
    ["gamma", [2, 4], 0, 0],
    ["gamma", [0.5, 4], 0, Number.POSITIVE_INFINITY],
    ["beta", [1, 3], 0, 3],
    ["beta", [2, 1], 1, 2],
    ["beta", [2, 3], 1, 0],
    ["beta", [1, 1], 0.4, 1],
    ["f", [2, 7], 0, 1],
    ["exponential", [4], 0, 0.25],
    ["uniform", [2, 4], 2, 0.5],
    ["uniform", [2, 4], 4, 0.5],
    ["lognormal", [0, 1], 0, 0],
    ["poisson", [0], 0, 1],
    ["poisson", [4], 2.5, 0],
    ["binomial", [5, 1], 5, 1],
    ["binomial", [5, 0], 0, 1],
    ["binomial", [5, 0], 1, 0],
    ["negativeBinomial", [0, 2], 0, 1],
  ])("%s(%j) has at %f the density %f", (name, parameters, value, density) => {
    expect(of(name, parameters).density(value)).toBeCloseTo(density, 14);
  });

  test.each<[Name, Parameters, number, number]>([
    ["gamma", [0.5, 4], -1, Number.POSITIVE_INFINITY],
    ["exponential", [4], -1, Number.POSITIVE_INFINITY],
    ["lognormal", [0, 1], -1, Number.POSITIVE_INFINITY],
    ["f", [1, 7], -1, Number.POSITIVE_INFINITY],
    ["f", [0.5, 0.1], -1, Number.POSITIVE_INFINITY],
    ["t", [3], Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY],
    ["normal", [0, 1], Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY],
    ["beta", [0.5, 0.5], -0.1, 1.1],
    ["uniform", [2, 3], 1, 4],
    ["poisson", [4], -1, Number.POSITIVE_INFINITY],
    ["binomial", [4, 0.5], -1, 5],
    ["negativeBinomial", [4, 2], -1, Number.POSITIVE_INFINITY],
  ])("%s(%j) has nothing below %f and above %f", (name, parameters, below, above) => {
    const distribution = of(name, parameters);
    expect([below, above].map(distribution.density)).toEqual([0, 0]);
    expect([below, above].map(distribution.cumulative)).toEqual([0, 1]);
    expect([below, above].map(distribution.upperTail)).toEqual([1, 0]);
  });

  test.each<[Name, Parameters, number, number]>([
    ["gamma", [2, 4], 0, Number.POSITIVE_INFINITY],
    ["exponential", [4], 0, Number.POSITIVE_INFINITY],
    ["lognormal", [0, 1], 0, Number.POSITIVE_INFINITY],
    ["f", [3, 7], 0, Number.POSITIVE_INFINITY],
    ["t", [3], Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY],
    ["normal", [3, 2], Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY],
    ["beta", [2, 3], 0, 1],
    ["uniform", [2, 3], 2, 3],
    ["poisson", [4], 0, Number.POSITIVE_INFINITY],
    ["poisson", [0], 0, 0],
    ["binomial", [4, 0.5], 0, 4],
    ["negativeBinomial", [4, 2], 0, Number.POSITIVE_INFINITY],
  ])("%s(%j) reaches from %f to %f", (name, parameters, lowest, highest) => {
    const distribution = of(name, parameters);
    expect(
      [0, 1].map((p) => Math.abs(distribution.quantile(p)) * Math.sign(distribution.quantile(p))),
    ).toEqual([lowest, highest]);
    expect(distribution.upperQuantile(1)).toBeCloseTo(lowest, 12);
    expect(distribution.upperQuantile(0)).toBe(highest);
  });

  // By the leading term of the series: P(x) = (x/k)^k/Gamma(k + 1) near 0, so the value of 1e-200 is below 1e-308.
  test("gives what no number can hold as 0 or infinite", () => {
    expect(distributions.gamma(0.1, 1).quantile(1e-200)).toBe(0);
    expect(distributions.beta(1e-4, 2).quantile(1e-200)).toBe(0);
    expect(distributions.f(1e-3, 1e-3).upperQuantile(1e-200)).toBe(Number.POSITIVE_INFINITY);
    expect(distributions.f(1e-3, 1e-3).quantile(1e-200)).toBe(0);
    expect(distributions.t(1e-3).quantile(1e-200)).toBe(Number.NEGATIVE_INFINITY);
  });

  // By definition: the lowest count with at least the probability; a half falls on 0 of one fair trial exactly.
  test("of counts takes the lowest count that reaches the probability", () => {
    expect(distributions.binomial(1, 0.5).quantile(0.5)).toBe(0);
    expect(distributions.binomial(1, 0.5).upperQuantile(0.5)).toBe(0);
    for (const distribution of [distributions.poisson(7.3), distributions.negativeBinomial(20, 0.8)]) {
      for (let count = 0; count < 25; count++) {
        const reached = distribution.cumulative(count);
        expect(distribution.quantile(reached)).toBe(count);
        expect(distribution.quantile(reached + 1e-9)).toBe(count + 1);
        expect(distribution.cumulative(count + 0.7)).toBe(reached);
        expect(distribution.upperQuantile(distribution.upperTail(count))).toBe(count);
      }
    }
  });

  test("keeps the mark of a missing value", () => {
    for (const distribution of [
      distributions.poisson(4),
      distributions.normal(),
      distributions.gamma(2, 1),
    ]) {
      const { density, cumulative, upperTail } = distribution;
      expect([density, cumulative, upperTail].map((each) => each(Number.NaN))).toEqual([NaN, NaN, NaN]);
    }
  });
});

describe("a distribution refuses", () => {
  test.each<[() => unknown, string]>([
    [
      () => distributions.poisson(-1),
      "Parameter `mean` of `distributions.poisson` must be a finite number, at least 0; -1 was given. Write, for example, `distributions.poisson(4)`.",
    ],
    [
      () => distributions.normal(0, 0),
      "Parameter `sd` of `distributions.normal` must be a finite number above 0; 0 was given. Write, for example, `distributions.normal(0, 1)`.",
    ],
    [
      () => distributions.normal(Number.NaN),
      "Parameter `mean` of `distributions.normal` must be a finite number; NaN was given. Write, for example, `distributions.normal(0, 1)`.",
    ],
    [
      () => (distributions.t as () => Distribution)(),
      "Parameter `degreesOfFreedom` of `distributions.t` must be a finite number above 0; undefined was given. Write, for example, `distributions.t(10)`.",
    ],
    [
      () => distributions.f(2, Number.POSITIVE_INFINITY),
      "Parameter `denominator` of `distributions.f` must be a finite number above 0; Infinity was given. Write, for example, `distributions.f(2, 20)`.",
    ],
    [
      () => distributions.poisson(Number.POSITIVE_INFINITY),
      "Parameter `mean` of `distributions.poisson` must be a finite number, at least 0; Infinity was given. Write, for example, `distributions.poisson(4)`.",
    ],
    [
      () => distributions.binomial(2.5, 0.5),
      "Parameter `size` of `distributions.binomial` must be a whole number, at least 0; 2.5 was given. Write, for example, `distributions.binomial(20, 0.3)`.",
    ],
    [
      () => distributions.binomial(-1, 0.5),
      "Parameter `size` of `distributions.binomial` must be a whole number, at least 0; -1 was given. Write, for example, `distributions.binomial(20, 0.3)`.",
    ],
    [
      () => distributions.binomial(20, 30),
      "Parameter `probability` of `distributions.binomial` must be a number from 0 to 1; 30 was given. Write, for example, `distributions.binomial(20, 0.3)`.",
    ],
    [
      () => distributions.binomial(20, -0.1),
      "Parameter `probability` of `distributions.binomial` must be a number from 0 to 1; -0.1 was given. Write, for example, `distributions.binomial(20, 0.3)`.",
    ],
    [
      () => distributions.uniform(3, 3),
      "Parameter `high` of `distributions.uniform` must be a finite number above `low`; 3 was given. Write, for example, `distributions.uniform(0, 1)`.",
    ],
    [
      () => distributions.poisson(4).quantile(95),
      "A probability must be a number from 0 to 1; 95 was given to `quantile`. Write `quantile(0.95)`.",
    ],
    [
      () => distributions.poisson(4).upperQuantile(-0.1),
      "A probability must be a number from 0 to 1; -0.1 was given to `upperQuantile`. Write `upperQuantile(0.95)`.",
    ],
    [
      () => distributions.poisson(4).quantile(1000),
      "A probability must be a number from 0 to 1; 1000 was given to `quantile`. Write `quantile(0.95)`.",
    ],
    [
      () => distributions.poisson(4).density("3" as unknown as number),
      "`density` takes one number; 3 was given. Give a single number, as in `density(3)`; for a list, call it for each value with `map`.",
    ],
    [
      () => distributions.poisson(4).upperTail([1, 2] as unknown as number),
      "`upperTail` takes one number; 1,2 was given. Give a single number, as in `upperTail(3)`; for a list, call it for each value with `map`.",
    ],
  ])("%s", (call, message) => {
    expect(call).toThrow(expect.objectContaining({ name: "ModelError", message }));
  });

  test("and keeps what was given", () => {
    expect(() => distributions.beta(1, -2)).toThrow(
      expect.objectContaining({
        code: "bad-distribution-parameter",
        facts: { distribution: "beta", parameter: "b", value: -2 },
      }),
    );
    expect(() => distributions.beta(1, 2).quantile(2)).toThrow(
      expect.objectContaining({ code: "bad-probability", facts: { probability: 2 } }),
    );
    expect(() => distributions.beta(1, 2).cumulative("x" as unknown as number)).toThrow(
      expect.objectContaining({ code: "bad-value", facts: { value: "x" } }),
    );
  });
});

// Source: R 4.2.2, functions qt, qchisq, qf and qnorm, printed to 10 significant digits.
// Relative tolerance 5e-10, half a unit of the last digit printed.
describe("the distributions of test statistics", () => {
  test.each([
    [1, 12.70620474],
    [2, 4.30265273],
    [5, 2.570581836],
    [10, 2.228138852],
    [17, 2.109815578],
    [30, 2.042272456],
    [120, 1.979930405],
  ])("have the Student t quantile at 0.975 with %i degrees of freedom", (degrees, value) => {
    near(studentQuantile(0.975, degrees), value, 5e-10);
    near(studentQuantile(0.025, degrees), -value, 5e-10);
  });

  test.each([
    [1, 3.841458821],
    [2, 5.991464547],
    [3, 7.814727903],
    [5, 11.07049769],
    [10, 18.30703805],
    [20, 31.41043284],
    [30, 43.77297183],
  ])("have the chi-square quantile at 0.95 with %i degrees of freedom", (degrees, value) => {
    near(chiSquareQuantile(0.95, degrees), value, 5e-10);
    near(chiSquareCdf(value, degrees), 0.95, 5e-10);
    near(chiSquareUpperTail(value, degrees), 0.05, 5e-9);
  });

  test.each([
    [1, 10, 4.964602744],
    [2, 17, 3.591530568],
    [3, 20, 3.098391212],
    [5, 30, 2.533554548],
  ])("have the F quantile at 0.95 with %i and %i degrees of freedom", (numerator, denominator, value) => {
    near(fQuantile(0.95, numerator, denominator), value, 5e-10);
    near(fUpperTail(value, numerator, denominator), 0.05, 5e-9);
  });

  test.each([
    [0.9, 1.281551566],
    [0.95, 1.644853627],
    [0.975, 1.959963985],
    [0.99, 2.326347874],
    [0.995, 2.575829304],
  ])("have the normal quantile at %f", (probability, value) => {
    near(normalQuantile(probability), value, 5e-10);
    near(normalCdf(value), probability, 5e-10);
  });

  // Source: Wichura (1988), Algorithm AS 241, Applied Statistics 37:477, test value -9.262340089798408, from memory.
  test("have the normal quantile with all its digits in the far tail", () => {
    near(normalQuantile(1e-20), -9.26234008979841, 1e-15);
  });

  // Source: mpmath 1.3.0 with 40 digits: the values with 2^-40 above them; 1 - 2^-40 is held exactly.
  test("have far upper quantiles with all their digits", () => {
    const probability = 1 - 2 ** -40;
    near(normalQuantile(probability), 7.047700256664409, 1e-13);
    near(chiSquareQuantile(probability, 1), 51.030335667497305, 1e-13);
    near(studentQuantile(probability, 10), 40.92058256173976, 1e-13);
    near(fQuantile(probability, 2, 17), 213.33530750731484, 1e-13);
  });

  // Source: mpmath 1.3.0, erfc and exp with 40 digits.
  test("have far normal tails with all their digits", () => {
    near(normalUpperTail(20), 2.7536241186062337e-89, 1e-14);
    near(normalUpperTail(37.5), 4.605353009581955e-308, 1e-15);
    near(normalDensity(30.03), 5.988702553759707e-197, 1e-14);
    expect([normalDensity(41), normalUpperTail(41), normalUpperTail(-41)]).toEqual([0, 0, 1]);
  });
});
