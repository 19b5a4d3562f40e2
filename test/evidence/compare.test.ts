import { describe, expect, test } from "vitest";
import { type Fit, type FitOptions, fit } from "../../src/estimate/index.js";
import { compare } from "../../src/evidence/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { recurrence } from "../../src/rule/index.js";
import { culture, cultureOf } from "./culture.js";
import { drawn } from "./drawn.js";
import { population } from "./published-series.js";
import { series } from "./series.js";

const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
const crowding = recurrence("ΔN = r*N*(1 - N/K)");
const onLog: FitOptions = { errors: "observation", distribution: "lognormal" };
const off = (value: number, expected: number): number => Math.abs(value / expected - 1);

describe("compare", () => {
  // Source: R 4.2.2, lm and AIC (which counts sigma) on the changes of uspop; printed to ten digits.
  test("AIC, AICc and BIC of four regressions of the changes of uspop (R lm and AIC)", () => {
    const expected: Readonly<Record<string, readonly number[]>> = {
      "ΔN = c": [127.4733099, 128.2733099, 129.2540534],
      "ΔN = r*N": [103.7010437, 104.5010437, 105.4817872],
      "ΔN = c + r*N": [98.80157813, 100.5158638, 101.4726934],
      "ΔN = r*N + s*N^2": [100.6101815, 102.3244672, 103.2812967],
    };
    const fits = Object.keys(expected).map((text) =>
      fit(recurrence(text), series(population), { errors: "process" }),
    );
    for (const row of compare(fits).rows) {
      const [aic, aicCorrected, bic] = expected[row.rule]!;
      expect(off(row.aic, aic!)).toBeLessThan(1e-9);
      expect(off(row.aicCorrected, aicCorrected!)).toBeLessThan(1e-9);
      expect(off(row.bic, bic!)).toBeLessThan(1e-9);
    }
  });

  // Source: computed with R 4.2 and SciPy for a made-up culture of 21 readings; printed to 3 decimals.
  test("AICc of three growth rules by trajectory fit, and the verdict (R and SciPy)", () => {
    const gompertz = recurrence("N[t+1] = exp(a)*N^b");
    const fits = [sheltered, gompertz, recurrence("N[t+1] = R*N")].map((rule) => fit(rule, culture, onLog));
    const compared = compare(fits);
    expect(compared.rows.map((row) => row.aicCorrected.toFixed(2))).toEqual(["-75.29", "-51.91", "-5.43"]);
    expect(compared.verdict).toEqual({ kind: "supported", rules: [sheltered.text] });
    expect(compared.sentence).toMatchInlineSnapshot(
      `"The record supports "N[t+1] = R*N/(1 + (R - 1)*N/K)"; the next rival, "N[t+1] = exp(a)*N^b", lies 23.4 behind in AICc."`,
    );
  });

  // Source: profile with R 4.2 and SciPy: the first 9 readings of the record end before growth slows, so the capacity has
  // no upper limit.
  test("says that a parameter of a rule is not determined by the record", () => {
    const fits = [sheltered, crowding].map((rule) => fit(rule, cultureOf(9), onLog));
    expect(compare(fits).rows.find((row) => row.rule === sheltered.text)!.undetermined).toBe(true);
  });

  test("the likelihood ratio of nested rules, and none on the edge of a range", () => {
    const ricker = recurrence("N[t+1] = N*exp(r*(1 - N/K))");
    const shaped = recurrence("N[t+1] = N*exp(r*(1 - (N/K)^theta))");
    const open = compare([ricker, shaped].map((rule) => fit(rule, culture, onLog))).likelihoodRatios[0]!;
    expect(open).toMatchObject({
      smaller: ricker.text,
      larger: shaped.text,
      at: { theta: 1 },
      degreesOfFreedom: 1,
    });
    expect(open.probability).toBeGreaterThan(0);
    const bounded = { ...onLog, bounds: { theta: [1, 9] } } as const;
    const [edge] = compare([fit(ricker, culture, onLog), fit(shaped, culture, bounded)]).likelihoodRatios;
    expect(edge!.probability).toBeUndefined();
    expect(edge!.sentence).toContain("lies on the edge of the range of theta");
  });

  // Source: the definition; under a change of unit, y to 1000 y, -sum ln y falls by n ln 1000.
  test("rules on different scales are compared on the record's own", () => {
    const fits = [fit(sheltered, culture, onLog), fit(sheltered, culture, { errors: "observation" })];
    const compared = compare(fits);
    expect(compared.notes.join(" ")).toContain("brought back by -sum ln(y)");
    const logs = fits[0]!.groups[0]!.points.reduce((sum, point) => sum + Math.log(point.observed), 0);
    const own = compared.rows.map((row) => row.logLikelihood);
    expect(own).toContain(fits[0]!.groups[0]!.criteria!.logLikelihood - logs);
  });

  test("two rivals within 2 units of AICc with different decisions are both printed, and none is called best", () => {
    const values = drawn(sheltered, [1.25, 100], 20, 16, 0.06, "observation", randomStream(2));
    const fits = [sheltered, crowding].map((rule) => fit(rule, series(values), onLog));
    const decide = ({ rule }: Fit): string =>
      rule === sheltered ? "Draw down at day 20." : "Draw down at day 17.";
    const compared = compare(fits, { decide });
    expect(compared.verdict.kind).toBe("undecided");
    expect(compared.decisions).toHaveLength(2);
    expect(compared.sentence).toContain("no rule is called best");
    for (const { rule, decision } of compared.decisions)
      expect(compared.sentence).toContain(`By "${rule}": ${decision}`);
  });

  test("says that none is adequate where readings only scatter about a level", () => {
    const stream = randomStream(8);
    const values = Float64Array.from({ length: 30 }, () => 50 * Math.exp(0.1 * stream.normal()));
    const compared = compare([sheltered, crowding].map((rule) => fit(rule, series(values), onLog)));
    expect(compared.verdict).toEqual({ kind: "none-adequate", rules: [] });
    expect(compared.sentence).toMatch(/^None adequate: "mean level" explains the record as well/);
  });

  test("forecasts of the rule that made the record beat the naive ones and keep their level", () => {
    const values = drawn(sheltered, [1.5, 100], 5, 40, 0.05, "process", randomStream(3));
    const options = { errors: "process", distribution: "lognormal" } as const;
    const fits = [sheltered, recurrence("N[t+1] = R*N")].map((rule) => fit(rule, series(values), options));
    const { scores, forecasts } = compare(fits, { origins: 24, periods: 3, level: 0.8 }).rollingOrigin!;
    const named = (name: string): (typeof scores)[number] => scores.find((score) => score.name === name)!;
    expect(named(sheltered.text).crps).toBeLessThan(named("no change").crps);
    expect(named(sheltered.text).crps).toBeLessThan(named("last multiplier").crps);
    // Four binomial errors, as if forecasts were independent.
    expect(Math.abs(named(sheltered.text).coverage - 0.8)).toBeLessThan(
      4 * Math.sqrt((0.8 * 0.2) / forecasts),
    );
  });

  test("rules that name their state differently are compared, forecasts and all", () => {
    const owed = recurrence("owed[t+1] = R*owed/(1 + (R - 1)*owed/K)");
    const compared = compare([fit(owed, culture, onLog), fit(crowding, culture, onLog)]);
    expect(compared.verdict.rules).toContain(owed.text);
    expect(compared.rollingOrigin!.forecasts).toBeGreaterThan(0);
  });

  test("says where a naive forecast came closer than the rules", () => {
    const line = Float64Array.from({ length: 20 }, (_, t) => 10 + 2 * t);
    const noisy = line.map((value, t) => value + (t % 2 === 0 ? 0.01 : -0.01));
    const options: FitOptions = { errors: "process" };
    const fits = [recurrence("N[t+1] = R*N"), recurrence("N[t+1] = R*N^b")].map((rule) =>
      fit(rule, series(noisy), options),
    );
    expect(compare(fits).sentence).toMatch(/"last change" came closer than|clearly worse than "last change"/);
  });

  test("the weights add up to 1, and a change of unit moves no difference", () => {
    const scale = (factor: number): ReturnType<typeof compare> =>
      compare(
        [sheltered, crowding].map((rule) =>
          fit(rule, series(culture.groups[0]!.values["density"]!.map((v) => v * factor)), onLog),
        ),
      );
    const [small, large] = [scale(1), scale(1000)];
    expect(small.rows.reduce((sum, row) => sum + row.weight, 0)).toBeCloseTo(1, 12);
    for (const [i, row] of small.rows.entries())
      expect(row.difference).toBeCloseTo(large.rows[i]!.difference, 6);
  });

  test("refuses a single fit, other records and other kinds of error", () => {
    const along = fit(sheltered, culture, onLog);
    const steps = fit(crowding, culture, { ...onLog, errors: "process" });
    const part = fit(crowding, cultureOf(15), onLog);
    expect(() => compare([along])).toThrowErrorMatchingInlineSnapshot(
      `[ModelError: A comparison needs at least two fits; 1 given. Pass them as a list: compare([first, second]).]`,
    );
    expect(() => compare([along, part])).toThrowErrorMatchingInlineSnapshot(
      `[ModelError: "N[t+1] = R*N/(1 + (R - 1)*N/K)" and "ΔN = r*N*(1 - N/K)" were fitted to different records. Fit every rival to the same observations.]`,
    );
    expect(() => compare([along, steps])).toThrowErrorMatchingInlineSnapshot(
      `[ModelError: Fits that put the error in the process and in the observation explain different numbers (steps and values), so their likelihoods cannot be set side by side. Fit every rival with the same { errors }; check(fit) tells which kind of error the record speaks for.]`,
    );
  });

  test("filters that begin differently are refused for that, and compared from the same first state", () => {
    const read = [
      52, 47, 55, 49, 44, 58, 51, 46, 53, 50, 43, 48, 57, 54, 45, 50, 52, 47, 56, 49, 51, 48, 46, 54,
    ];
    const rivals = (options: FitOptions): Fit[] =>
      ["N[t+1] = a*N + b", "N[t+1] = N"].map((text) => fit(recurrence(text), series(read), options));
    const both: FitOptions = { errors: "both", intervals: "none" };
    const apart = rivals(both);
    expect(apart.map(({ groups }) => groups[0]!.filter!.start)).toEqual(["stationary", "diffuse"]);
    expect(() => compare(apart)).toThrowErrorMatchingInlineSnapshot(
      `[ModelError: "N[t+1] = a*N + b" counts 24 readings and "N[t+1] = N" 23, of the same record: one of them takes the first reading from the rule's long-run distribution, the other begins at it. Give both fits the same first state, \`initial: { N: ... }\`, so that both count the readings after it.]`,
    );
    const { rows } = compare(rivals({ ...both, initial: { N: 50 } }));
    // Source: computed with SciPy's minimize on an exact Kalman filter from a known first state of 50: log-likelihoods
    // -65.2175398 with 2 unknowns and -64.3435787 with 4.
    expect(rows.map(({ rule }) => rule)).toEqual(["N[t+1] = N", "N[t+1] = a*N + b"]);
    expect(Math.abs(rows[0]!.aic - 134.4350796)).toBeLessThan(1e-6);
    expect(Math.abs(rows[1]!.aic - 136.6871574)).toBeLessThan(1e-6);
  });
});
