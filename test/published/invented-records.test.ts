// Expected values: worked out with R 4.2.2 and scipy apart from this project; see fixtures/invented/SOURCE.md. Estimates to
// four significant digits, standard errors to three, likelihoods to 1e-3, or half a unit of the last digit printed.
import { describe, expect, test } from "vitest";
import { fit, type Observations, observations, recurrence } from "../../kernel-helpers/index.js";
import { named, near } from "./matchers.js";
import { readColumns } from "./read-columns.js";

const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
const trajectory = { errors: "observation", distribution: "lognormal" } as const;

describe("a culture recorded every half hour", () => {
  const { hours, density } = readColumns("invented/culture-density.csv");
  const until = (hour: number): Observations => {
    const kept = hours!.filter((time) => time <= hour).length;
    return observations(
      { hours: hours!.slice(0, kept), density: density!.slice(0, kept) },
      { period: "hours", step: { every: 0.5, of: "hour" }, value: "density" },
    );
  };

  test("capacity, growth rate and initial level with their profiles (R and SciPy)", () => {
    const fitted = fit(sheltered, until(99), trajectory);
    const [group] = fitted.groups;
    near(named(fitted, "K").value, 1.5199, 5e-5);
    near(named(fitted, "K").standardError, 0.0566, 1e-3);
    near(named(fitted, "K").profile.lower, 1.4097, 5e-5);
    near(named(fitted, "K").profile.upper, 1.6499, 5e-5);
    near(named(fitted, "N[0]").value, 0.019815, 5e-5);
    near(named(fitted, "N[0]").profile.lower, 0.01907, 5e-4);
    near(named(fitted, "N[0]").profile.upper, 0.02059, 5e-4);
    // Per hour: r = 2 ln R.
    near(named(fitted, "R").value, 1.312689, 1e-6);
    near(2 * Math.log(named(fitted, "R").value), 0.54415, 2e-5);
    near(2 * Math.log(named(fitted, "R").profile.lower!), 0.53134, 2e-5);
    near(2 * Math.log(named(fitted, "R").profile.upper!), 0.55712, 2e-5);
    near((2 * named(fitted, "R").standardError!) / named(fitted, "R").value, 0.006127, 1e-3);
    near(group!.sigma, 0.0339, 2e-4);
    near(group!.sumOfSquares, 0.0206803, 5e-6);
    expect(Math.abs(group!.criteria!.aicCorrected - -75.29)).toBeLessThan(1e-3);
    const exponential = fit(recurrence("N[t+1] = R*N"), until(99), trajectory);
    expect(Math.abs(exponential.groups[0]!.criteria!.aicCorrected - -5.431)).toBeLessThan(1e-3);
    const gompertz = fit(recurrence("N[t+1] = N^b*K^(1 - b)"), until(99), trajectory);
    expect(Math.abs(gompertz.groups[0]!.criteria!.aicCorrected - -51.908)).toBeLessThan(1e-3);
  });

  test.each([
    [4, 0.494, 0.27],
    [3, 0.399, 0.177],
  ])("cut at hour %i, the record does not determine the capacity (R and SciPy)", (hour, estimate, lower) => {
    const fitted = fit(sheltered, until(hour), trajectory);
    const capacity = named(fitted, "K");
    expect(Math.abs(capacity.value - estimate)).toBeLessThan(5e-4);
    expect(Math.abs(capacity.profile.lower! - lower)).toBeLessThan(5e-4);
    expect(capacity.profile.upper).toBeUndefined();
    expect(capacity.standardError).toBeUndefined();
    const warning = fitted.groups[0]!.warnings.find(({ code }) => code === "not-determined")!;
    expect(warning.message).toMatch(/^K is not determined by this record/);
  });
});

describe("a Gompertz state-space record with process and observation error", () => {
  const { period, log_count } = readColumns("invented/log-counts.csv");
  const counts = observations(
    { period: period!, count: log_count!.map(Math.exp) },
    { period: "period", step: { every: 1, of: "year" }, value: "count" },
  );
  const rule = recurrence("N[t+1] = exp(a)*N^b");

  test("the one-step slope is biased towards 0", () => {
    const naive = fit(rule, counts, { errors: "process", distribution: "lognormal" });
    near(named(naive, "b").value, 0.60457, 1e-5);
    near(named(naive, "b").standardError, 0.1074, 5e-4);
  });

  test("the state-space likelihood, exact on the log scale, with its profile (R)", () => {
    const both = fit(rule, counts, { errors: "both", distribution: "lognormal" });
    const [group] = both.groups;
    near(named(both, "a").value, 0.5706, 1e-4);
    near(named(both, "b").value, 0.7246, 1e-4);
    near(named(both, "process error").value, 0.2994, 2e-4);
    near(named(both, "observation error").value, 0.2046, 3e-4);
    expect(Math.abs(group!.criteria!.logLikelihood - -27.891)).toBeLessThan(1e-3);
    expect(Math.abs(named(both, "b").profile.lower! - 0.409)).toBeLessThan(1e-3);
    expect(Math.abs(named(both, "b").profile.upper! - 0.958)).toBeLessThan(1e-3);
    expect(group!.filter).toMatchObject({ start: "stationary", method: "exact" });
    // The split is known weakly: the record does not tell that there is any error of reading.
    expect(named(both, "observation error").profile.lower).toBeUndefined();
    expect(named(both, "observation error").standardError).toBeUndefined();
  });
});

describe("sales censored by sold-out days", () => {
  const sold = [14, 17, 20, 11, 20, 16, 13, 20, 18, 15, 20, 12, 19, 20, 10];
  const out = sold.map((count) => (count === 20 ? 1 : 0));
  const days = observations(
    { day: sold.map((_, day) => day), sold, out },
    { period: "day", step: { every: 1, of: "day" }, value: "sold", censored: { above: "out" } },
  );
  const steady = recurrence("D[t+1] = D");

  test("as counts", () => {
    const fitted = fit(steady, days, { errors: "observation", distribution: "poisson" });
    const mean = named(fitted, "D[0]");
    near(mean.value, 17.0913, 3e-6);
    near(mean.standardError, 1.127, 5e-4);
    near(mean.profile.lower, 14.985, 4e-5);
    near(mean.profile.upper, 19.411, 3e-5);
  });

  test("as normal values", () => {
    const fitted = fit(steady, days, { errors: "observation" });
    near(named(fitted, "D[0]").value, 17.3637, 3e-6);
    near(named(fitted, "sigma").value, 4.899, 1e-5);
  });
});

test("a harvested stock observed through an index with unknown catchability (R and SciPy)", () => {
  const { year, catch_t, index_kg_per_haul } = readColumns("invented/catch-and-index.csv");
  const survey = observations(
    { year: year!, taken: catch_t!, index: index_kg_per_haul! },
    { period: "year", step: { every: 1, of: "year" }, values: { B: "index" }, inputs: ["taken"] },
  );
  const options = { ...trajectory, factor: { B: "q" }, cut: "chi-square" } as const;
  const fitted = fit(
    recurrence("B[t+1] = B + r*B*(1 - B/K) - taken", { inputs: ["taken"] }),
    survey,
    options,
  );
  near(named(fitted, "r").value, 0.41347, 2e-5);
  near(named(fitted, "r").profile.lower, 0.3335, 2e-4);
  near(named(fitted, "r").profile.upper, 0.4968, 2e-4);
  near(named(fitted, "K").value, 898.2, 1e-4);
  near(named(fitted, "B[0]").value / named(fitted, "K").value, 0.9406, 1e-4);
  near(named(fitted, "q").value, 0.012647, 5e-5);
  near(Math.sqrt(fitted.groups[0]!.sumOfSquares / fitted.groups[0]!.count), 0.069, 1e-3);
  // The maximum sustainable yield r K / 4 as a parameter.
  const inYield = recurrence("B[t+1] = B + 4*most/K*B*(1 - B/K) - taken", { inputs: ["taken"] });
  const yields = named(fit(inYield, survey, options), "most");
  near(yields.value, 92.85, 6e-5);
  near(yields.profile.lower, 87.56, 6e-5);
  near(yields.profile.upper, 98.72, 6e-5);
});

test("log-linear growth with known sd: parameter error in the prediction bands (closed form)", () => {
  // 24 increments whose mean is 0.03 exactly, of known standard deviation 0.06.
  const level = Array.from({ length: 25 }, (_, t) => 3 + 0.03 * t + (t % 2 === 0 ? 0 : 0.04));
  const series = observations(
    { year: level.map((_, t) => t), level },
    { period: "year", step: { every: 1, of: "year" }, value: "level" },
  );
  const fitted = fit(recurrence("L[t+1] = L + g"), series, { errors: "process", sd: 0.06 });
  near(named(fitted, "g").value, 0.03, 1e-9);
  const error = named(fitted, "g").standardError!;
  const predicted = (ahead: number): number => Math.sqrt(ahead * 0.06 ** 2 + (ahead * error) ** 2);
  near(predicted(1), 0.061237, 1e-5);
  near(predicted(6), 0.164317, 1e-5);
  near(predicted(12), 0.254558, 1e-5);
});
