// Expected values: R 4.2.2 (lm, ar.ols, arima, StructTS) on the data sets of its package datasets, printed to ten digits:
// regressions hold to 1e-8; likelihoods that an optimiser found hold to 1e-3, log-likelihoods to 1e-4 absolute.
import { expect, test } from "vitest";
import { fit, type Observations, observations, recurrence } from "../../kernel-helpers/index.js";
import { named, near } from "./matchers.js";
import { readColumns } from "./read-columns.js";

function yearly(file: string, every = 1, scale: (value: number) => number = (value) => value): Observations {
  const { period, value } = readColumns(`series/${file}.csv`);
  return observations(
    { year: period!, value: value!.map(scale) },
    { period: "year", step: { every, of: "year" }, value: "value" },
  );
}
const process = { errors: "process" } as const;

test("uspop: change on level without intercept (R lm)", () => {
  const line = fit(recurrence("ΔN = r*N + s*N^2"), yearly("us-population", 10), process);
  near(named(line, "r").value, 0.2312704809, 1e-8);
  near(named(line, "r").standardError, 0.03502430939, 1e-8);
  near(named(line, "s").value, -0.0005807864246, 1e-8);
  near(named(line, "s").standardError, 0.0002539606225, 1e-8);
  near(line.groups[0]!.sumOfSquares, 202.070346, 1e-8);
  const curve = fit(recurrence("ΔN = r*N*(1 - N/K)"), yearly("us-population", 10), process);
  near(named(curve, "K").value, 398.2022841, 1e-8);
});

test("uspop: AR(1) by least squares, with an unstable fixed point (R lm)", () => {
  const line = fit(recurrence("N[t+1] = c + phi*N"), yearly("us-population", 10), process);
  near(named(line, "c").value, 3.315367989, 1e-8);
  near(named(line, "phi").value, 1.124368219, 1e-8);
  near(named(line, "c").value / (1 - named(line, "phi").value), -26.65767846, 1e-8);
});

test("ChickWeight chick 1: growth on weight (R lm)", () => {
  const { day, gram } = readColumns("series/chick-1-weight.csv");
  const even = observations(
    { day: day!.slice(0, 11), gram: gram!.slice(0, 11) },
    { period: "day", step: { every: 2, of: "day" }, value: "gram" },
  );
  const line = fit(recurrence("ΔW = a + b*W"), even, process);
  near(named(line, "a").value, 0.6958219034, 1e-8);
  near(named(line, "b").value, 0.160301048, 1e-8);
  near(line.groups[0]!.sumOfSquares, 73.70869382, 1e-8);
});

test("LakeHuron: AR(1) by least squares (R lm)", () => {
  const line = fit(recurrence("L[t+1] = c + phi*L"), yearly("lake-huron-level"), process);
  near(named(line, "c").value, 94.71257438, 1e-8);
  near(named(line, "c").standardError, 32.23789848, 1e-8);
  near(named(line, "phi").value, 0.8364113148, 1e-8);
  near(named(line, "phi").standardError, 0.05567899279, 1e-8);
  near(line.groups[0]!.sumOfSquares, 49.37654504, 1e-8);
});

test("lynx: AR(2) of the logarithm by least squares (R lm)", () => {
  const line = fit(recurrence("L[t+1] = c + a*L + b*L[t-1]"), yearly("lynx-trapped", 1, Math.log10), process);
  const expected = {
    c: [1.057600456, 0.1219111215],
    a: [1.384237712, 0.06389479695],
    b: [-0.7477757204, 0.0639485046],
  };
  for (const [name, [value, error]] of Object.entries(expected)) {
    near(named(line, name).value, value!, 1e-8);
    near(named(line, name).standardError, error!, 1e-8);
  }
  near(line.groups[0]!.sumOfSquares, 5.782580842, 1e-8);
  const [a, b] = ["a", "b"].map((name) => named(line, name).value) as [number, number];
  near(Math.sqrt(-b), 0.8647402618, 1e-8);
  near((2 * Math.PI) / Math.acos(a / 2 / Math.sqrt(-b)), 9.773628896, 1e-8);
});

test("lh: exact likelihood of an AR(1) without observation error (R arima)", () => {
  const { period, value } = readColumns("series/hormone-level.csv");
  const series = observations(
    { reading: period!, value: value! },
    { period: "reading", step: { every: 1, of: "reading" }, value: "value" },
  );
  const exact = fit(recurrence("H[t+1] = mean + phi*(H - mean)"), series, {
    errors: "both",
    sd: 0,
  });
  near(named(exact, "phi").value, 0.5739296, 1e-3);
  near(named(exact, "phi").standardError, 0.1161393, 1e-3);
  near(named(exact, "mean").value, 2.413288, 1e-3);
  near(named(exact, "mean").standardError, 0.1466135, 1e-3);
  near(named(exact, "process error").value ** 2, 0.1974895, 1e-3);
  expect(Math.abs(exact.groups[0]!.criteria!.logLikelihood - -29.379162)).toBeLessThan(1e-4);
  expect(Math.abs(exact.groups[0]!.criteria!.aic - 64.758325)).toBeLessThan(2e-4);
});

test("Nile: local level model, by likelihood and by its MA(1) form (R StructTS and arima)", () => {
  // Durbin and Koopman (2001), Time Series Analysis by State Space Methods, print 1469.1 and 15099.
  const level = fit(recurrence("L[t+1] = L"), yearly("nile-flow"), { errors: "both" });
  const step = named(level, "process error").value ** 2;
  const reading = named(level, "observation error").value ** 2;
  near(step, 1469.146632, 1e-3);
  near(reading, 15098.57709, 1e-3);
  expect(Math.abs(level.groups[0]!.criteria!.logLikelihood - -632.5456244)).toBeLessThan(1e-4);
  // The same as a moving average of the changes: s2 (1 + theta)^2 = step, -theta s2 = reading.
  const [theta, variance] = [-0.7329426, 20599.86681];
  near(step, variance * (1 + theta) ** 2, 1e-3);
  near(reading, -theta * variance, 1e-3);
});
