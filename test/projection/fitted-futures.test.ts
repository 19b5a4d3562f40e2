import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { fit } from "../../src/estimate/index.js";
import { normalQuantile, randomStream } from "../../src/numeric/index.js";
import { forecast, simulate } from "../../src/projection/index.js";
import { type Observations, observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";

function record(
  columns: Readonly<Record<string, readonly number[]>>,
  inputs: readonly string[] = [],
): Observations {
  const [name = "x"] = Object.keys(columns).filter((key) => !inputs.includes(key));
  const count = columns[name]!.length;
  const table = tableOf({ t: Array.from({ length: count }, (_, t) => t), ...columns } as Record<
    string,
    number[]
  >);
  return observations(table, {
    period: "t",
    step: { every: 1, of: "week" },
    value: name,
    ...(inputs.length > 0 && { inputs }),
  });
}

test("a state-space fit goes on from its filtered state with both errors", () => {
  const stream = randomStream(23);
  let state = 100;
  const read = Array.from({ length: 60 }, () => {
    state = 0.8 * state + 20 + 3 * stream.normal();
    return state + 2 * stream.normal();
  });
  const fitted = fit(recurrence("x[t+1] = a*x + b"), record({ x: read }), {
    errors: "both",
    fixed: { a: 0.8, b: 20 },
  });
  const { filter } = fitted.groups[0]!;
  const [q, r] = [filter!.processError["x"]!, filter!.observationError["x"]!];
  const [mean, variance] = [filter!.last.mean[0]!, filter!.last.covariance[0]!];
  const paths = 40_000;
  const ahead = forecast(fitted, { periods: 6, paths, levels: [0.8], seed: 6 });
  const band = ahead.groups[0]!.states[0]!.bands.find((each) => each.kind === "future observation")!;
  for (const h of [1, 3, 6]) {
    // Source: prediction by the Kalman filter: mean a^h m + b(1-a^h)/(1-a), variance a^(2h) P + q^2 (1-a^(2h))/(1-a^2) + r^2 (Durbin
    // and Koopman, Time Series Analysis by State Space Methods, section 4.11; from memory). Parameters are given, so exact but
    // for 4.5 Monte-Carlo errors of a decile.
    const power = 0.8 ** (2 * h);
    const sd = Math.sqrt(power * variance + (q * q * (1 - power)) / (1 - 0.64) + r * r);
    const centre = 0.8 ** h * mean + 100 * (1 - 0.8 ** h);
    const error = (Math.sqrt(0.09 / paths) / 0.1755) * sd;
    expect(Math.abs(band.upper[h]! - centre - normalQuantile(0.9) * sd)).toBeLessThan(4.5 * error);
    expect(Math.abs(band.lower[h]! - centre + normalQuantile(0.9) * sd)).toBeLessThan(4.5 * error);
  }
});

describe("a rule with an input", () => {
  const rain = [3, 5, 1, 4, 6, 2, 7, 3, 5, 4, 2, 6];
  const stored = [50];
  const scatter = [0.1, -0.2, 0.05, 0.15, -0.1, -0.05, 0.2, -0.15, 0.1, 0, -0.1];
  for (let t = 1; t < rain.length; t++) stored.push(0.9 * stored[t - 1]! + 2 * rain[t]! + scatter[t - 1]!);
  const rule = recurrence("w[t+1] = keep*w + gain*rain[t+1]", { inputs: ["rain"] });
  const fitted = fit(rule, record({ w: stored, rain }, ["rain"]), { errors: "process" });

  test("needs a plan for every period ahead", () => {
    expect(() => forecast(fitted, { periods: 4 })).toThrow(
      "The rule needs rain for the next 4 periods; supply a scenario, such as inputs: { rain: { usual: 0 } }.",
    );
    expect(() => forecast(fitted, { periods: 4, inputs: { rain: [1, 2] } })).toThrow(
      "Invalid plan for `rain`: it has 2 values and the projection needs 4. Give one for each period, or { usual, from, at }.",
    );
  });

  test("is projected under several, with the same draws in each", () => {
    const ahead = forecast(fitted, {
      periods: 4,
      paths: 200,
      scenarios: { usual: { rain: 4 }, "a dry third week": { rain: { usual: 4, at: { 14: 0 } } } },
    });
    const [usual, dry] = ahead.groups;
    const { keep, gain } = fitted.groups[0]!.parameters as { keep: number; gain: number };
    let level = stored.at(-1)!;
    for (let h = 1; h <= 4; h++) {
      level = keep * level + 4 * gain;
      expect(usual!.states[0]!.central[h]).toBeCloseTo(level, 10);
    }
    for (let path = 0; path < 200; path++) {
      const [a, b] = [usual!.ensemble.future[0]!, dry!.ensemble.future[0]!];
      expect(b[path * 5 + 2]).toBe(a[path * 5 + 2]);
      expect(b[path * 5 + 3]).toBeLessThan(a[path * 5 + 3]!);
    }
  });
});

test("a rule with a lag goes on from the last recorded values, not from the last one alone", () => {
  const values = [10, 12];
  for (let t = 2; t < 24; t++)
    values.push(0.5 * values[t - 1]! + 0.4 * values[t - 2]! + 1.5 + 0.3 * Math.sin(3 * t));
  const fitted = fit(recurrence("x[t+1] = a*x + c*x[t-1] + b"), record({ x: values }), { errors: "process" });
  const { a, b, c } = fitted.groups[0]!.parameters as { a: number; b: number; c: number };
  const { central } = forecast(fitted, { periods: 2, paths: 20 }).groups[0]!.states[0]!;
  const first = a * values[23]! + c * values[22]! + b;
  expect(central[0]).toBe(values[23]);
  expect(central[1]).toBeCloseTo(first, 10);
  expect(central[2]).toBeCloseTo(a * first + c * values[23]! + b, 10);
});

test("a horizon longer than the record is said to be conditional", () => {
  const fitted = fit(recurrence("x[t+1] = a*x"), record({ x: [10, 9.1, 8.2, 7.2, 6.6, 5.9, 5.2] }), {
    errors: "process",
  });
  const [group] = forecast(fitted, { periods: 60, paths: 50 }).groups;
  expect(group!.warnings.map((each) => each.message)).toContain(
    "Projection of 60 periods from 6 observed: treat beyond 6 as conditional.",
  );
});

test("bands are nested around the median, whatever the rule's parameters and noise", () => {
  fc.assert(
    fc.property(
      fc.double({ min: -0.9, max: 1.1, noNaN: true }),
      fc.double({ min: -5, max: 5, noNaN: true }),
      fc.double({ min: 0, max: 3, noNaN: true }),
      fc.integer({ min: 0, max: 1e6 }),
      (a, b, sd, seed) => {
        const [state] = simulate(recurrence("x[t+1] = a*x + b"), {
          parameters: { a, b },
          initial: { x: 3 },
          periods: 4,
          noise: { x: { distribution: "normal", sd } },
          paths: 61,
          seed,
        }).groups[0]!.states;
        const [half, eighty, most] = state!.bands;
        for (let t = 0; t <= 4; t++) {
          const ordered = [
            most!.lower[t]!,
            eighty!.lower[t]!,
            half!.lower[t]!,
            state!.median[t]!,
            half!.upper[t]!,
            eighty!.upper[t]!,
            most!.upper[t]!,
          ];
          expect([...ordered].sort((x, y) => x - y)).toEqual(ordered);
        }
      },
    ),
    { seed: 7, numRuns: 60 },
  );
});
