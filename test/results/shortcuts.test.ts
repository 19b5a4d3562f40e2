import { describe, expect, test } from "vitest";
import {
  compare,
  fit,
  forecast,
  observations,
  recurrence,
  rules,
  simulate,
  timeToReach,
  updateFit,
} from "../../kernel-helpers/index.js";

const step = { every: 1, of: "month" } as const;
const owedFrom = (values: readonly number[]): ReturnType<typeof observations> =>
  observations(
    { month: values.map((_, i) => i), owed: values },
    { period: "month", step, value: "owed", unit: "EUR" },
  );
const steady = recurrence("owed[t+1] = owed + c");

const flasks = observations(
  {
    flask: [..."AAAAAABBBBBB"],
    hour: [0, 1, 2, 3, 4, 5, 0, 1, 2, 3, 4, 5],
    N: [10, 12, 14.4, 17.3, 20.7, 24.9, 8, 8.8, 9.7, 10.6, 11.7, 12.9],
  },
  { period: "hour", step: { every: 1, of: "hour" }, by: "flask", value: "N" },
);
const growth = recurrence("N[t+1] = R*N");

describe("a fit of one group", () => {
  const fitted = fit(steady, owedFrom([10, 12, 13, 15, 18, 20, 21, 24]), { errors: "observation" });

  // Source: a straight line, SciPy 1.17 `linregress` and `t.ppf(0.975, 6)`, printed to 12 digits.
  test("has its estimates by name, first values among them, and both limits of each", () => {
    expect(fitted.values["c"]).toBeCloseTo(1.988095238095, 9);
    expect(fitted.values["owed[0]"]).toBeCloseTo(9.666666666667, 9);
    expect(fitted.interval("c")[0]).toBeCloseTo(1.777364330722, 6);
    expect(fitted.interval("c")[1]).toBeCloseTo(2.198826145468, 6);
    expect(fitted.interval("owed[0]")[0]).toBeCloseTo(8.785116033895, 6);
    expect(fitted.interval("owed[0]")[1]).toBeCloseTo(10.548217299438, 6);
  });

  test("has the values of held parameters, which have no interval", () => {
    const held = fit(
      growth,
      observations({ t: [0, 1, 2, 3, 4], N: [1, 2, 4, 8, 17] }, { period: "t", step: "week", value: "N" }),
      {
        errors: "observation",
        fixed: { R: 2 },
      },
    );
    expect(held.values["R"]).toBe(2);
    expect(() => held.interval("R")).toThrow("R was held at 2 and not estimated");
  });

  test("a limit that the record does not give is infinite, and the estimate is there all the same", () => {
    // Growth without any sign of a ceiling: K has no upper limit.
    const young = observations(
      { hour: [0, 1, 2, 3, 4, 5, 6], N: [1, 1.52, 2.24, 3.4, 5.02, 7.65, 11.3] },
      { period: "hour", step: { every: 1, of: "hour" }, value: "N" },
    );
    const open = fit(rules.logistic(), young, { errors: "observation", distribution: "lognormal" });
    expect(open.groups[0]!.estimates.find(({ name }) => name === "K")!.standardError).toBeUndefined();
    expect(open.values["K"]).toBe(open.groups[0]!.estimates.find(({ name }) => name === "K")!.value);
    expect(open.interval("K")[1]).toBe(Number.POSITIVE_INFINITY);
  });

  test("a name that is not there is an error with the nearest one", () => {
    expect(() => fitted.values["owed[1]"]).toThrow(
      'This fit has no "owed[1]". It has "c" and "owed[0]". Did you mean "owed[0]"?',
    );
    expect(() => fitted.interval("owed")).toThrow('This fit has no "owed"');
  });

  test("with the first value given, that one is named as well", () => {
    const known = fit(steady, owedFrom([10, 12, 13, 15, 18, 20]), {
      errors: "observation",
      initial: { owed: 10 },
    });
    expect(known.values["owed[0]"]).toBe(10);
  });

  test("updateFit and decide hand on fits with the same shortcuts", () => {
    const later = observations(
      { month: [8, 9], owed: [26, 28] },
      { period: "month", step, value: "owed", unit: "EUR" },
    );
    expect(updateFit(fitted, later).fit.values["c"]).toBeGreaterThan(1.9);
    const rivals = [fitted, fit(rules.geometric(), fitted.observations, { errors: "observation" })];
    const told = compare(rivals, { decide: (each) => each.values["owed[0]"]!.toFixed(2) });
    expect(told.decisions.map(({ decision }) => decision)).toContain("9.67");
  });
});

describe("a fit of several groups", () => {
  const fitted = fit(growth, flasks, { errors: "observation" });

  test.each([
    ["values", () => fitted.values],
    ["interval", () => fitted.interval("R")],
  ])("%s is an error that says what to write", (member, ask) => {
    expect(ask).toThrow(
      `\`.${member}\` needs a single group, and this fit has 2: "A" and "B". Write \`.group("A").${member}\` for one of them, or loop over \`.groups\`.`,
    );
  });

  test("what it says to write works", () => {
    expect(fitted.group("A").values["R"]).toBe(fitted.groups[0]!.parameters["R"]);
    expect(fitted.groups[1]!.values["R"]).toBe(fitted.groups[1]!.parameters["R"]);
    expect(fitted.group("B").interval("R")[0]).toBe(fitted.groups[1]!.estimates[0]!.profile.lower);
    expect(() => fitted.group("C")).toThrow('This fit has no group "C". It has "A" and "B".');
  });

  test("fitted together, parameters that hold for all groups are answered; first values are each group's own", () => {
    const together = fit(growth, flasks, { errors: "observation", groups: "combined" });
    expect(together.values["R"]).toBe(together.groups[0]!.parameters["R"]);
    expect(together.interval("R")[0]).toBe(together.population![0]!.profile.lower);
    expect(() => together.values["N[0]"]).toThrow('Values of one group: `.group("A").values`.');
    expect(together.group("B").values["N[0]"]).toBe(together.groups[1]!.initial["N"]);
  });
});

describe("projections and times", () => {
  // Source: owed = 1000 - 25 t with errors of 0.5 whose sum and product with t are 0, so that least squares gives the
  // line back; it is 0 at t = 40.
  const errors = [1, -1, -1, 1, 1, -1, -1, 1];
  const line = fit(steady, owedFrom(errors.map((sign, t) => 1000 - 25 * t + 0.5 * sign)), {
    errors: "observation",
  });
  const ahead = forecast(line, { periods: 40, paths: 50 });

  test("a forecast has its path by state and its last value", () => {
    expect(ahead.values["owed"]).toHaveLength(48);
    expect(ahead.values["owed"]![10]).toBeCloseTo(750, 6);
    expect(ahead.last("owed")).toBeCloseTo(-175, 6);
    expect(ahead.fit.values["c"]).toBeCloseTo(-25, 9);
    expect(() => ahead.values["owd"]).toThrow(
      'This forecast has no "owd". It has "owed". Did you mean "owed"?',
    );
  });

  test("a time to a level has its times by themselves", () => {
    const cleared = timeToReach(ahead, { fallsTo: 0 });
    expect(cleared.time).toBeCloseTo(40, 6);
    expect(cleared.firstPeriod).toBe(cleared.groups[0]!.firstPeriod);
    expect(cleared.never).toBe(0);
  });

  const scenarios = simulate(recurrence("owed[t+1] = owed - payment", { inputs: ["payment"] }), {
    initial: { owed: 100 },
    periods: 8,
    scenarios: { slow: { payment: 20 }, fast: { payment: 50 } },
  });

  test("of several scenarios each is asked by its name", () => {
    expect(scenarios.group("fast").values["owed"]).toEqual([100, 50, 0, -50, -100, -150, -200, -250, -300]);
    expect(scenarios.group("slow").last("owed")).toBe(-60);
    const cleared = timeToReach(scenarios, { fallsTo: 0 });
    expect(cleared.group("slow").firstPeriod).toBe(5);
    expect(cleared.group("fast").firstPeriod).toBe(2);
    expect(() => cleared.firstPeriod).toThrow(
      '`.firstPeriod` needs a single group, and this answer has 2: "slow" and "fast". Write `.group("slow").firstPeriod`',
    );
    expect(() => scenarios.values).toThrow('Write `.group("slow").values` for one of them');
  });

  test("of several groups and scenarios each is asked by both names", () => {
    const fed = observations(
      {
        flask: [..."AAAAAABBBBBB"],
        hour: [0, 1, 2, 3, 4, 5, 0, 1, 2, 3, 4, 5],
        N: [1, 3.1, 6, 10.2, 15, 21.1, 2, 4.2, 7, 11.1, 16, 22.2],
        fed: [1, 2, 3, 4, 5, 6, 1, 2, 3, 4, 5, 6],
      },
      { period: "hour", step: { every: 1, of: "hour" }, by: "flask", value: "N", inputs: ["fed"] },
    );
    const both = forecast(
      fit(recurrence("N[t+1] = N + a*fed[t+1]", { inputs: ["fed"] }), fed, { errors: "observation" }),
      { periods: 2, paths: 20, scenarios: { low: { fed: 1 }, high: { fed: 9 } } },
    );
    expect(both.group("B, high").group).toBe("B");
    expect(both.group("B, high").scenario).toBe("high");
    expect(() => both.group("high")).toThrow(
      '"high" names 2 groups of this forecast: "A, high" and "B, high".',
    );
  });
});

describe("a record", () => {
  test("tells its last recorded value", () => {
    expect(owedFrom([186, 184, 182]).last("owed")).toBe(182);
    expect(flasks.last("N", "B")).toBe(12.9);
    expect(() => flasks.last("N")).toThrow('Write `.last("N", "A")` for one of them');
    expect(() => flasks.last("M", "A")).toThrow('This record has no "M". It has "N".');
  });

  test("a fit's own record tells it under the rule's name", () => {
    const renamed = fit(growth, owedFrom([10, 12, 14.5, 17, 21, 25]), { errors: "observation" });
    expect(renamed.observations.states[0]!.name).toBe("N");
    expect(renamed.observations.last("N")).toBe(25);
  });
});

test("shortcuts are left out of listings, JSON and copies for workers", () => {
  const fitted = fit(growth, flasks, { errors: "observation" });
  const all = [flasks, fitted, forecast(fitted, { periods: 2, paths: 20 })];
  for (const result of all) {
    const plain: unknown = structuredClone(result);
    expect(plain).toEqual(result);
    expect(Object.keys(result)).not.toContain("values");
    expect(Object.keys(result)).not.toContain("group");
    expect(() => JSON.stringify(result)).not.toThrow();
  }
  expect(JSON.stringify(fitted.group("A").values)).toBe(JSON.stringify({ ...fitted.group("A").values }));
});
