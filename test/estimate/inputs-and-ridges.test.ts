import { expect, test } from "vitest";
import { type Estimate, fit } from "../../src/estimate/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { type Observations, observations, tableOf } from "../../src/record/index.js";
import { recurrence, rules } from "../../src/rule/index.js";

/** Invented: a stock by Schaefer's rule, r 0.42, K 1000, first 840, read 4% off, its catch between 60 and 200. */
function stock(inputs: readonly string[] | Readonly<Record<string, string>>): Observations {
  const stream = randomStream(1);
  const rows = { year: [] as number[], index: [] as number[], catch: [] as number[] };
  let level = 840;
  for (let t = 0; t < 25; t++) {
    const taken = Math.round(60 + 140 * Math.exp(-(((t - 10) / 3) ** 2)));
    rows.year.push(t);
    rows.index.push(level * Math.exp(0.04 * stream.normal()));
    rows.catch.push(taken);
    level += 0.42 * level * (1 - level / 1000) - taken;
  }
  const step = { every: 1, of: "year" } as const;
  return observations(tableOf(rows), { period: "year", step, value: "index", inputs });
}

const trajectory = { errors: "observation", distribution: "lognormal" } as const;
const own = "Δindex = r*index*(1 - index/K) - catch";

test("a fit warns when the rule takes a recorded input for a parameter", () => {
  expect(fit(recurrence(own), stock(["catch"]), trajectory).warnings).toMatchInlineSnapshot(`
    [
      {
        "code": "input-taken-as-parameter",
        "message": "The record holds an input "catch", but the rule takes catch as a parameter: write recurrence(..., { inputs: ["catch"] }).",
      },
    ]
  `);
  expect(fit(recurrence(own, { inputs: ["catch"] }), stock(["catch"]), trajectory).warnings).toEqual([]);
});

test("a fit warns of an input that the rule does not read, and says how a named rule would", () => {
  const [warning] = fit(rules.schaefer(), stock(["catch"]), trajectory).warnings;
  expect(warning!.code).toBe("input-not-used");
  expect(warning!.message).toContain(
    'observations(..., { inputs: { C: "catch" } }) and rules.schaefer({ inputs: ["C"] })',
  );
  const told = fit(rules.schaefer({ inputs: ["C"] }), stock({ C: "catch" }), trajectory);
  expect(told.warnings).toEqual([]);
  // The parameters that made the record, within the intervals that the fit gives.
  const [r, K] = told.groups[0]!.estimates;
  expect(r!.profile.lower).toBeLessThan(0.42);
  expect(r!.profile.upper).toBeGreaterThan(0.42);
  expect(K!.profile.lower).toBeLessThan(1000);
  expect(K!.profile.upper).toBeGreaterThan(1000);
});

/** Whether a value lies in an interval, or beyond it by 1% of the way, as a search ends a little beside an edge. */
function holds({ value, profile }: Estimate, other: number): boolean {
  const { lower = Number.NEGATIVE_INFINITY, upper = Number.POSITIVE_INFINITY } = profile;
  const slack = 0.011 * Math.abs((other < value ? lower : upper) - value);
  return other >= lower - slack && other <= upper + slack;
}

test.each(["normal", "lognormal"] as const)(
  "no interval leaves out a rival optimum, distribution %s",
  (spread) => {
    for (const rule of [rules.schaefer(), recurrence(own)]) {
      const group = fit(rule, stock(["catch"]), { errors: "observation", distribution: spread }).groups[0]!;
      const within = group.rivals.filter(({ behind }) => 2 * behind < group.cut);
      for (const { estimates } of within)
        expect(group.estimates.filter((each, i) => !holds(each, estimates[i]!))).toEqual([]);
    }
  },
);
