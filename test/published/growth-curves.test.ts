// Expected values: R 4.2.2, nls on the data sets of its package datasets, printed to ten digits. nls stops at a relative
// offset of 1e-5, so coefficients and sums hold to 1e-6 and standard errors to 1e-5, unless said otherwise.
import { expect, test } from "vitest";
import { fit, leastSquares, observations, recurrence } from "../../kernel-helpers/index.js";
import { named, near } from "./matchers.js";
import { readColumns } from "./read-columns.js";

type Curve = (parameters: ArrayLike<number>, x: number) => number;
const logistic: Curve = (c, x) => c[0]! / (1 + Math.exp((c[1]! - x) / c[2]!));

function solved(x: readonly number[], y: readonly number[], curve: Curve, start: readonly number[]) {
  return leastSquares({ residuals: (c) => y.map((value, i) => value - curve(c, x[i]!)), start });
}

test("DNase run 1: logistic curve in the log concentration (R nls)", () => {
  // R stopped here 1.6e-6 short of the optimum: coefficients to 5e-6.
  const { concentration, density } = readColumns("series/dnase-run-1.csv");
  const found = solved(concentration!.map(Math.log), density!, logistic, [2, 1, 1]);
  [2.345181561, 1.483091715, 1.041455472].forEach((value, i) => {
    near(found.estimates[i], value, 5e-6);
  });
  [0.07815409584, 0.08135332496, 0.03227082017].forEach((value, i) => {
    near(found.standardErrors[i], value, 1e-5);
  });
  near(found.sumOfSquares, 0.00478956897, 1e-6);
});

test("ChickWeight chick 1: logistic curve whose asymptote is far beyond the record (R nls)", () => {
  const { day, gram } = readColumns("series/chick-1-weight.csv");
  const found = solved(day!, gram!, logistic, [400, 25, 10]);
  // The optimum is flat: 1e-4.
  [937.0300323, 35.22296109, 11.4052084].forEach((value, i) => {
    near(found.estimates[i], value, 1e-4);
  });
  near(found.sumOfSquares, 76.66235626, 1e-6);
  // As a rule: the record ends at 205 g, and the fit says that it does not tell the asymptote.
  const rule = recurrence("W[t+1] = A/(1 + exp((m - t)/s))");
  const daily = observations(
    { day: [-1, ...day!], gram: [40, ...gram!] },
    { period: "day", step: { every: 1, of: "day" }, value: "gram" },
  );
  const fitted = fit(rule, daily, { errors: "process" });
  near(named(fitted, "A").value, 937.0300323, 1e-4);
  expect(named(fitted, "A").standardError).toBeUndefined();
  expect(fitted.groups[0]!.warnings.map(({ code }) => code)).toContain("not-determined");
});

test("Orange tree 3: logistic curve (R nls)", () => {
  const { day, millimetre } = readColumns("series/orange-tree-3.csv");
  const found = solved(day!, millimetre!, logistic, [150, 700, 400]);
  [158.8294388, 734.84211, 400.9548208].forEach((value, i) => {
    near(found.estimates[i], value, 1e-6);
  });
  [15.08513613, 102.587226, 74.32948].forEach((value, i) => {
    near(found.standardErrors[i], value, 1e-5);
  });
  near(found.sumOfSquares, 156.6708044, 1e-6);
});

test("BOD: exponential approach, with the profile of its rate (R nls)", () => {
  const { day, demand } = readColumns("series/oxygen-demand.csv");
  const found = solved(day!, demand!, (c, x) => c[0]! * (1 - Math.exp(-c[1]! * x)), [20, 0.5]);
  // Printed from a fit that stopped early: coefficients 1e-5, errors 1e-4.
  [19.14258163, 0.5310907681].forEach((value, i) => {
    near(found.estimates[i], value, 1e-5);
  });
  [2.49592, 0.2030819].forEach((value, i) => {
    near(found.standardErrors[i], value, 1e-4);
  });
  near(found.sumOfSquares, 25.99026728, 1e-6);
  const rule = recurrence("D[t+1] = A*(1 - exp(-k*(t + 1)))");
  const daily = observations(
    { day: [0, ...day!], demand: [0, ...demand!] },
    { period: "day", step: { every: 1, of: "day" }, value: "demand" },
  );
  const { profile, wald } = named(fit(rule, daily, { errors: "process" }), "k");
  near(profile.lower, 0.1313977467, 1e-6);
  near(profile.upper, 1.808169595, 1e-6);
  // The symmetric interval reaches below 0, which no rate can.
  if (wald !== undefined) {
    near(wald.lower, -0.0327549, 1e-4);
    near(wald.upper, 1.0949365, 1e-4);
  }
});

test("Puromycin, treated: Michaelis-Menten curve (R nls)", () => {
  const { concentration, rate } = readColumns("series/puromycin-treated.csv");
  const found = solved(concentration!, rate!, (c, x) => (c[0]! * x) / (c[1]! + x), [200, 0.1]);
  [212.6837072, 0.06412122573].forEach((value, i) => {
    near(found.estimates[i], value, 1e-6);
  });
  [6.947153, 0.008280944].forEach((value, i) => {
    near(found.standardErrors[i], value, 1e-5);
  });
  near(found.sumOfSquares, 1195.448814, 1e-6);
});

test("uspop 1790 to 1970: logistic curve (R nls)", () => {
  const { period, value } = readColumns("series/us-population.csv");
  const found = solved(period!, value!, logistic, [200, 1900, 30]);
  [315.5446072, 1949.192544, 40.6039045].forEach((expected, i) => {
    near(found.estimates[i], expected, 1e-6);
  });
  [30.96968, 8.230227, 2.3782197].forEach((expected, i) => {
    near(found.standardErrors[i], expected, 1e-5);
  });
  near(found.sumOfSquares, 276.7714209, 1e-6);
});
