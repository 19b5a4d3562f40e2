import { describe, expect, test } from "vitest";
import { trajectory } from "../../src/dynamics/index.js";
import { fit } from "../../src/estimate/index.js";
import { forecast, simulate } from "../../src/projection/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";

const debt = recurrence("owed[t+1] = owed*(1 + rate[t+1]/12) - 500", { inputs: ["rate"] });
const monthEnd = (month: number): string => new Date(Date.UTC(2025, month + 1, 0)).toISOString().slice(0, 10);

/** The balance by the recurrence itself: `rates` are those of the months ahead. */
function balances(first: number, rates: readonly number[]): readonly number[] {
  const owed = [first];
  for (const rate of rates) owed.push(owed.at(-1)! * (1 + rate / 12) - 500);
  return owed;
}

describe("one plan", () => {
  const plan = { usual: 0.06, from: { "2026-06": 0.12 }, at: { "2026-04-30": 0 } };
  const rates = [0.06, 0.06, 0.06, 0, 0.06, 0.12, 0.12, 0.12];

  test("means the same in a trajectory and in a simulation, by dates", () => {
    const options = {
      initial: { owed: 10_000 },
      periods: 8,
      period: "month",
      startsAt: "2025-12-31",
      inputs: { rate: plan },
    } as const;
    const expected = balances(10_000, rates);
    const run = trajectory(debt, options).values["owed"]!;
    const { groups } = simulate(debt, options);
    expected.forEach((value, t) => {
      expect(run[t]).toBeCloseTo(value, 8);
      expect(groups[0]!.states[0]!.central[t]).toBeCloseTo(value, 8);
    });
    expect(groups[0]!.labels?.slice(0, 3)).toEqual(["2025-12-31", "2026-01-31", "2026-02-28"]);
  });

  test("goes by the record's own numbers where periods are numbered, and starts from its last value", () => {
    const months = [26, 27, 28];
    const record = observations(
      tableOf({ month: months, owed: [11_000, 10_500, 10_000], rate: [0.06, 0.06, 0.06] }),
      {
        period: "month",
        step: "month",
        value: "owed",
        inputs: ["rate"],
      },
    );
    const rate = { usual: 0.06, from: { 34: 0.12 }, at: { 32: 0 } };
    const from = { record, periods: 8, inputs: { rate } };
    const byNumber = simulate(debt, {
      initial: { owed: 10_000 },
      startsAt: 28,
      periods: 8,
      inputs: { rate },
    });
    for (const { groups } of [simulate(debt, from), byNumber]) {
      expect(groups[0]!.time).toEqual([28, 29, 30, 31, 32, 33, 34, 35, 36]);
      for (const [t, value] of balances(10_000, rates).entries())
        expect(groups[0]!.states[0]!.central[t]).toBeCloseTo(value, 8);
    }
  });

  test("that speaks of a period outside the projection is refused with what lies inside", () => {
    const options = { initial: { owed: 10_000 }, periods: 8, inputs: { rate: plan } } as const;
    expect(() => trajectory(debt, options)).toThrow(
      "Invalid plan for `rate`: `from` speaks of 2026-06, and the projection runs from 0 to 8: 2026-06 is none of its periods.",
    );
    expect(() => simulate(debt, { ...options, period: "month", startsAt: "2027-01-31" })).toThrow(
      "the projection runs from 2027-01-31 to 2027-09-30: 2026-06 lies outside it.",
    );
    const dated = { ...options, period: "month", startsAt: "2025-12-31" };
    expect(() => simulate(debt, { ...dated, inputs: { rate: { usual: 0.06, from: { 13: 0.12 } } } })).toThrow(
      "the projection runs from 2025-12-31 to 2026-08-31: 13 is none of its periods.",
    );
    expect(() => simulate(debt, { ...options, startsAt: "2025-12-31" })).toThrow('Write period: "month"');
  });

  test("that cannot be read is refused with what to write", () => {
    const run = (rate: unknown) => () =>
      trajectory(debt, { initial: { owed: 1 }, periods: 3, inputs: { rate: rate as number } });
    expect(run({ usal: 1 })).toThrow("it has no part `usal`. Write { usual, from, at }");
    expect(run({ from: { 1: 0.1 } })).toThrow("Write the level that holds where `from` and `at` say nothing");
    expect(run({ A: 1, B: 2 })).toThrow("or { byGroup: { ... } } for a plan a group");
    expect(run({ byGroup: { A: 1 } })).toThrow("no group of a record is projected here");
    expect(run("6%")).toThrow("6% is neither a number");
  });
});

describe("groups", () => {
  const rows = ["A", "B"].flatMap((borrower, k) => {
    const paid = [100, 300][k]!;
    let owed = 9000;
    return Array.from({ length: 10 }, (_, i) => {
      if (i > 0) owed = owed * 1.005 - paid;
      return { borrower, month: monthEnd(i), owed: owed + ((i * 7) % 3) - 1, paid };
    });
  });
  const columns = tableOf(
    Object.fromEntries(
      (["borrower", "month", "owed", "paid"] as const).map((name) => [name, rows.map((row) => row[name])]),
    ),
  );
  const record = observations(columns, {
    period: "month",
    step: "month-end",
    by: "borrower",
    value: "owed",
    inputs: ["paid"],
  });
  const fitted = fit(recurrence("owed[t+1] = owed*(1 + i) - paid[t+1]", { inputs: ["paid"] }), record, {
    errors: "process",
  });

  test("with inputs of their own are refused one plan, and take one each", () => {
    expect(() => forecast(fitted, { periods: 3, inputs: { paid: 200 } })).toThrow(
      'Give each its own: inputs: { paid: { byGroup: { "A": 100, "B": 300 } } }.',
    );
    const plans = { byGroup: { A: 100, B: { usual: 300, at: { "2025-12": 0 } } } };
    const { groups } = forecast(fitted, { periods: 3, inputs: { paid: plans }, paths: 20 });
    groups.forEach(({ states }, g) => {
      const i = fitted.groups[g]!.parameters["i"]!;
      const { central } = states[0]!;
      const paid = [
        [100, 100, 100],
        [300, 0, 300],
      ][g]!;
      for (const [t, payment] of paid.entries())
        expect(central[t + 1]).toBeCloseTo(central[t]! * (1 + i) - payment, 8);
    });
    expect(() => forecast(fitted, { periods: 3, inputs: { paid: { byGroup: { A: 1 } } } })).toThrow(
      '`byGroup` has no plan for "B"; it has A',
    );
    expect(() => forecast(fitted, { periods: 3, inputs: { paid: { byGroup: { A: 1, b: 2 } } } })).toThrow(
      'the fit has no group "b". It has: A, B. Did you mean "B"?',
    );
  });

  test("that share a driver, such as the weather, take one plan", () => {
    const rain = record.groups.map((group) => ({
      ...group,
      inputs: { paid: Float64Array.from(group.index, (t) => 100 + (t % 3)) },
    }));
    const shared = fit(fitted.rule, { ...record, groups: rain }, { errors: "process" });
    expect(forecast(shared, { periods: 2, inputs: { paid: 100 }, paths: 20 }).groups).toHaveLength(2);
  });

  test("start after an earlier date where one is asked for", () => {
    const paid = { byGroup: { A: 100, B: 300 } };
    const { groups } = forecast(fitted, { periods: 3, from: "2025-06", inputs: { paid }, paths: 20 });
    expect(groups[0]!.labels).toEqual(["2025-06-30", "2025-07-31", "2025-08-31", "2025-09-30"]);
    expect(groups[0]!.states[0]!.central[0]).toBe(record.groups[0]!.values["owed"]![5]);
    const each = forecast(fitted, {
      periods: 3,
      from: { byGroup: { A: "2025-06" } },
      inputs: { paid },
      paths: 20,
    });
    expect(each.groups.map(({ labels }) => labels![0])).toEqual(["2025-06-30", "2025-10-31"]);
    expect(() => forecast(fitted, { periods: 3, from: { byGroup: { C: "2025-06" } } })).toThrow(
      'Option `from`: the fit has no group "C".',
    );
    expect(groups[0]!.warnings[0]!.message).toBe(
      "The forecast starts after 2025-06-30; its parameters were estimated from the whole record, later rows included.",
    );
    // What is recorded after the start stands in for a plan.
    expect(
      forecast(fitted, { periods: 3, from: "2025-06", paths: 20 }).groups[0]!.states[0]!.central,
    ).toEqual(groups[0]!.states[0]!.central);
    expect(() => forecast(fitted, { periods: 3, from: "2026-06", inputs: { paid } })).toThrow(
      "2026-06 is no recorded period to start after; the record runs from 2025-01-31 to 2025-10-31.",
    );
  });
});

test("a missed period with an input is a step like any other: the sum of payments stays right", () => {
  // 1000 less 90 a month, nothing paid in month 5, whose balance is missing: a step over two months takes 0 and 90.
  const paid = [90, 90, 90, 90, 0, 90, 90, 90, 90];
  const owed = [1000, 910, 820, 730, null, 640, 550, 460, 370];
  const noise = [0.3, -0.2, 0.1, -0.3, 0, 0.2, -0.1, 0.3, -0.2];
  const table = tableOf({
    month: paid.map((_, i) => i + 1),
    owed: owed.map((v, i) => (v === null ? null : v + noise[i]!)),
    paid,
  });
  const record = observations(table, { period: "month", step: "month", value: "owed", inputs: ["paid"] });
  const rule = recurrence("owed[t+1] = owed + c - paid[t+1]", { inputs: ["paid"] });
  for (const errors of ["process", "observation"] as const) {
    const { value, standardError } = fit(rule, record, { errors }).groups[0]!.estimates[0]!;
    expect(Math.abs(value)).toBeLessThan(3 * standardError!);
    expect(Math.abs(value)).toBeLessThan(0.2);
  }
});

test("a step that no pair of rows spans once is warned of in the fit", () => {
  const table = tableOf({ time: [0, 900, 1800, 2700, 3600, 4500], N: [1, 1.13, 1.3, 1.47, 1.66, 1.9] });
  const record = observations(table, { period: "time", step: { every: 15, of: "minute" }, value: "N" });
  const { warnings } = fit(recurrence("N[t+1] = R*N"), record, { errors: "process" });
  expect(warnings.map(({ code }) => code)).toContain("step-at-odds");
});
