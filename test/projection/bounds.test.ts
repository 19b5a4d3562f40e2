// What becomes of paths at the bounds of their states.
import { describe, expect, test } from "vitest";
import { fit } from "../../src/estimate/index.js";
import { normalCdf } from "../../src/numeric/index.js";
import { forecast, simulate } from "../../src/projection/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";

const zero = [0, Number.POSITIVE_INFINITY] as const;

describe("a shelf that nothing refills, with normal demand", () => {
  const run = (bounds: Parameters<typeof recurrence>[1], d: number) =>
    simulate(recurrence("S[t+1] = S - d", bounds), {
      parameters: { d },
      initial: { S: 100 },
      periods: 10,
      noise: { S: { distribution: "normal", sd: 5 } },
      paths: 40_000,
      seed: 3,
    }).groups[0]!;

  // Source: the density of the walk stepped on a grid of 0.01 in a general-purpose program, absorbed at 0. Tolerance:
  // 4.5 Monte-Carlo errors.
  test.each([
    [8, 0.103396, 20.7744],
    [12, 0.897385, 0.77474],
  ])("counts emptied paths at 0: with %d a period", (d, emptied, mean) => {
    const { ensemble, left, warnings } = run({ bounds: { S: zero } }, d);
    const ends = Float64Array.from({ length: 40_000 }, (_, path) => ensemble.process[0]![path * 11 + 10]!);
    const share = ends.filter((value) => value === 0).length / 40_000;
    expect(Math.abs(share - emptied)).toBeLessThan(4.5 * Math.sqrt((emptied * (1 - emptied)) / 40_000));
    const average = ends.reduce((sum, value) => sum + value, 0) / 40_000;
    const sd = Math.sqrt(ends.reduce((sum, value) => sum + (value - average) ** 2, 0) / 40_000);
    expect(Math.abs(average - mean)).toBeLessThan((4.5 * sd) / 200);
    expect(left).toBe(0);
    expect(warnings.map(({ message }) => message).join()).toMatch(
      /^\d+% \(Monte-Carlo error 0\.\d+%\) of the paths reach the bound 0 of S before the end and stay there; they are counted at the bound\.$/,
    );
  });

  test("or ends them, where a value below 0 is an error of the rule, and says the share", () => {
    const { ensemble, left, states, warnings } = run(
      { bounds: { S: { range: zero, atBounds: "error" } } },
      12,
    );
    const live = ensemble.process[0]!.filter((_, at) => at % 11 === 10).filter(
      (value) => !Number.isNaN(value),
    );
    expect(left).toBeCloseTo(1 - live.length / 40_000, 12);
    expect(Math.abs(left - 0.897385)).toBeLessThan(4.5 * Math.sqrt((0.9 * 0.1) / 40_000));
    expect(states[0]!.bands.every(({ lower }) => lower.every((value) => value >= 0))).toBe(true);
    expect(warnings.at(-1)!.message).toMatch(
      /^90% \(Monte-Carlo error 0\.\d%\) of the paths leave the range of a state before the end; the bands are those of the others\.$/,
    );
  });

  test("one step away has the exact share below 0", () => {
    const one = simulate(recurrence("S[t+1] = S - d", { bounds: { S: zero } }), {
      parameters: { d: 10 },
      initial: { S: 12 },
      periods: 1,
      noise: { S: { distribution: "normal", sd: 2 } },
      paths: 20_000,
    }).groups[0]!;
    const share = one.ensemble.process[0]!.filter((value, at) => at % 2 === 1 && value === 0).length / 20_000;
    // Source: P(2 + 2 z < 0) = Phi(-1).
    expect(Math.abs(share - normalCdf(-1))).toBeLessThan(4.5 * Math.sqrt((0.16 * 0.84) / 20_000));
  });
});

test("a value that the rule itself puts on a bound is left to the rule", () => {
  // Source: a shelf of 5 gives out 5, receives 5, and so on, by hand.
  const rule = recurrence("given = min(S, 8)\nS[t+1] = S - given + received[t+1]", {
    inputs: ["received"],
    bounds: { S: zero },
  });
  const { central } = simulate(rule, {
    initial: { S: 5 },
    periods: 4,
    inputs: { received: [0, 0, 5, 0, 5] },
  }).groups[0]!.states[0]!;
  expect(central).toEqual([5, 0, 5, 0, 5]);
});

test("when one state dies out the others go on", () => {
  // Source: by hand: prey 4, 1, then 0 for good; feed 10 less 2 a period.
  const rule = recurrence("prey[t+1] = prey - 3\nfeed[t+1] = feed - 2", { bounds: { prey: zero } });
  const [prey, feed] = simulate(rule, { initial: { prey: 4, feed: 10 }, periods: 4 }).groups[0]!.states;
  expect(prey!.central).toEqual([4, 1, 0, 0, 0]);
  expect(feed!.central).toEqual([10, 8, 6, 4, 2]);
});

test("a rule with lags holds a state at its bound, and reads the bound as its past", () => {
  // Source: by hand: 5, 5 - 3, 2 - 5 -> 0, and 0 from there on, whatever 2 periods before was.
  const rule = recurrence("x[t+1] = x - x[t-1]", { bounds: { x: zero } });
  const { central } = simulate(rule, { initial: { x: [3, 5] }, periods: 4 }).groups[0]!.states[0]!;
  expect(central).toEqual([5, 2, 0, 0, 0]);
});

describe("a debt that is cleared within the forecast", () => {
  // Made by a debt of 5000 at 1% a month with 300 paid, readings within 2 EUR.
  const owed = [5000];
  for (let i = 0, balance = 5000; i < 12; i++) {
    balance = balance * 1.01 - 300 + (((i * 7) % 3) - 1) * 2;
    owed.push(Number(balance.toFixed(2)));
  }
  const record = observations(tableOf({ month: owed.map((_, i) => i), owed }), {
    period: "month",
    step: { every: 1, of: "month" },
    value: "owed",
    unit: "EUR",
  });
  const last = (text: string, bounds: Parameters<typeof recurrence>[1]) => {
    const fitted = fit(recurrence(text, bounds), record, { errors: "observation" });
    const [state] = forecast(fitted, { periods: 12 }).groups[0]!.states;
    const band = state!.bands.find(({ kind, level }) => kind === "future observation" && level === 0.95)!;
    return {
      central: state!.central.at(-1),
      lower: band.lower,
      upper: band.upper.at(-1),
      median: state!.median,
    };
  };

  test("is 0 and stays 0, on the path and in every band, as an observation too", () => {
    const found = last("owed[t+1] = owed*(1 + i) - p", { bounds: { owed: zero } });
    expect(found).toMatchObject({ central: 0, upper: 0 });
    expect(found.lower.at(-1)).toBe(0);
    expect(found.median.at(-1)).toBe(0);
  });

  test("is never observed below 0 where the rule cannot give that", () => {
    const found = last("owed[t+1] = max(0, owed*(1 + i) - p)", {});
    expect(found.central).toBe(0);
    expect(Math.min(...found.lower)).toBe(0);
  });
});

test("an observed share stays between 0 and 1", () => {
  const found = simulate(recurrence("p[t+1] = p", { bounds: { p: [0, 1] } }), {
    initial: { p: 0.98 },
    periods: 2,
    observationNoise: { p: { distribution: "normal", sd: 0.05 } },
  });
  const band = found.groups[0]!.states[0]!.bands.find(({ level }) => level === 0.95)!;
  expect(band.upper[2]).toBe(1);
  expect(band.lower[2]).toBeGreaterThan(0.8);
});
