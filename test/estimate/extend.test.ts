import { expect, test } from "vitest";
import { fit, updateFit } from "../../src/estimate/index.js";
import { recurrence } from "../../src/rule/index.js";
import { record } from "./record.js";

const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
const values = [10.1, 13.4, 18.9, 24.3, 32.2, 40.5, 50.1, 58.2, 67.9, 74.8, 81.2, 86.3];
const options = { errors: "observation" } as const;
const first = fit(sheltered, record({ N: values.slice(0, 9) }), options);

test("later rows give the fit of the whole record, also over a gap", () => {
  const later = record({ t: [10, 11], N: values.slice(10) });
  const { fit: now, added, changes } = updateFit(first, later);
  const kept = [0, 1, 2, 3, 4, 5, 6, 7, 8, 10, 11];
  const whole = fit(sheltered, record({ t: kept, N: kept.map((t) => values[t]!) }), options);
  expect(now.groups[0]!.estimates.map(({ value }) => value)).toEqual(
    whole.groups[0]!.estimates.map(({ value }) => value),
  );
  expect(added).toEqual({ "": 2 });
  expect(changes[1]).toMatchObject({ name: "K", was: first.groups[0]!.estimates[1]!.value });
});

test("an estimate that moves far is pointed out", () => {
  const { remarks } = updateFit(first, record({ t: [9, 10, 11], N: [60, 50, 40] }));
  expect(remarks.join(" ")).toMatch(/moved from .* standard errors: check whether the rule still holds/);
});

test("rows that the fit already has are refused, and no rows", () => {
  const again = record({ t: [8, 9], N: [67, 75] });
  expect(() => updateFit(first, again)).toThrow(expect.objectContaining({ code: "rows-overlap" }));
});
