import { describe, expect, test } from "vitest";
import { fit } from "../../src/estimate/index.js";
import { forecast } from "../../src/projection/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";

/** Made by the logistic rule at r .3, K 1000 with a catch of 60, readings to one decimal. */
const caught = 60;
const index = [900];
for (let t = 0; t < 12; t++) {
  const now = index[t]!;
  index.push(Number((now + 0.3 * now * (1 - now / 1000) - caught + (t % 2 === 0 ? 3 : -3)).toFixed(1)));
}
const record = observations(
  tableOf({ year: index.map((_, t) => 2013 + t), index, catch: index.map(() => caught) }),
  { period: "year", step: { every: 1, of: "year" }, value: "index", inputs: ["catch"] },
);
const ahead = (bounds: Readonly<Record<string, readonly [number, number]>>) => {
  const rule = recurrence("Δindex = r*index*(1 - index/K) - catch", { inputs: ["catch"], bounds });
  const fitted = fit(rule, record, { errors: "process" });
  const scenarios = { usual: { catch: 60 }, high: { catch: 250 } };
  return forecast(fitted, { periods: 10, scenarios, paths: 200 });
};
const coded = (code: string, bounds = {}) =>
  ahead(bounds).groups.map(({ warnings }) => warnings.find((each) => each.code === code)?.message);

describe("a path that goes below zero where no record was", () => {
  test("is warned of under the scenario that takes it there, and there only", () => {
    const [usual, high] = coded("leaves-recorded-sign");
    expect(usual).toBeUndefined();
    expect(high).toMatch(
      /^By year 2035 the rule gives index = -\d+(\.\d)? under "high": no record of it was ever below 0\. Read nothing beyond year 20\d\d; if index ends at 0, give the rule the lower bound 0 for it\.$/,
    );
  });

  test("has its last period of a plain sign named", () => {
    const [, high] = ahead({}).groups;
    const { central } = high!.states[0]!;
    const below = central.findIndex((value) => value < 0);
    expect(coded("leaves-recorded-sign")[1]).toContain(`beyond year ${high!.time[below - 1]};`);
  });

  test("is left to the bounds where they are stated", () => {
    expect(coded("leaves-recorded-sign", { index: [0, Infinity] })).toEqual([undefined, undefined]);
    expect(coded("paths-absorbed", { index: [0, Infinity] })[1]).toMatch(
      /^100% of the paths reach the bound 0 of index before the end and stay there; they are counted at the bound\.$/,
    );
    expect(coded("leaves-recorded-sign", { index: [-Infinity, Infinity] })).toEqual([undefined, undefined]);
  });
});

test("where the first step reads a recorded input, the count of those needed says so", () => {
  // The step to period t + 1 reads the catch of t: ten steps from the last record need nine more.
  const rule = recurrence("Δindex = r*index*(1 - index/K) - catch", { inputs: ["catch"] });
  expect(() => forecast(fit(rule, record, { errors: "process" }), { periods: 10 })).toThrow(
    "The rule needs catch for the next 9 periods (the first step reads the last recorded value); supply a scenario, such as inputs: { catch: { usual: 0 } }.",
  );
});
