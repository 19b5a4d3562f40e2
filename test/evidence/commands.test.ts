import { expect, test } from "vitest";
import {
  changePoint,
  check,
  compare,
  densityDependence,
  fit,
  observations,
  propose,
  recurrence,
} from "../../kernel-helpers/index.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";
import { densities } from "./culture.js";

const culture = observations(
  { hours: densities.map((_, i) => i / 2), density: [...densities] },
  { period: "hours", step: { every: 0.5, of: "hour" }, value: "density" },
);
const rules = ["N[t+1] = R*N/(1 + (R - 1)*N/K)", "ΔN = r*N*(1 - N/K)"].map((text) => recurrence(text));
const options = { errors: "observation", distribution: "lognormal" } as const;

async function textOf(shown: unknown): Promise<string> {
  return String((await bundleOf(shown))?.["text/plain"]);
}

test("a check shows its tests, four panels of residuals, recovery and parts of the record", async () => {
  const checked = check(fit(rules[0]!, culture, options));
  const text = await textOf(checked);
  for (const part of [
    "Correlation at lag 1",
    "By the residual before",
    "found again in records drawn",
    "without the last row",
  ])
    expect(text).toContain(part);
  expect(text).toContain(checked.sentence);
});

test("a comparison shows evidence, what each rule leads to, and forecasts beside naive ones", async () => {
  const fits = rules.map((rule) => fit(rule, culture, options));
  const compared = compare(fits, { decide: ({ rule }) => `by ${rule.parameters.join(" and ")}` });
  const text = await textOf(compared);
  for (const part of [
    compared.sentence,
    "What each rule that stands leads to",
    "by r and K",
    "mean level (naive)",
  ])
    expect(text).toContain(part);
});

test("a proposal shows every rule with its answer", async () => {
  const proposal = propose(culture);
  const text = await textOf(proposal);
  for (const row of proposal.rows) expect(text).toContain(row.name);
  for (const part of [proposal.sentence, "Rules that were not tried", "The record and the rules it supports"])
    expect(text).toContain(part);
});

test("a search for a break and a test of density dependence show their sentences", async () => {
  const looked = changePoint(rules[1]!, culture, { distribution: "lognormal", resamples: 99 });
  expect(await textOf(looked)).toContain(looked.sentence);
  const tested = densityDependence(culture, { resamples: 199 });
  expect(await textOf(tested)).toContain(tested.sentence);
});
