import { expect, test, vi } from "vitest";

const read = vi.hoisted(() => ({ texts: [] as string[], compiled: 0 }));

vi.mock("../../src/rule/syntax/parse-rule.js", async (original) => {
  const own = await original<typeof import("../../src/rule/syntax/parse-rule.js")>();
  return {
    ...own,
    parseRule: (text: string) => {
      read.texts.push(text);
      return own.parseRule(text);
    },
  };
});
vi.mock("../../src/rule/code/generate-rule.js", async (original) => {
  const own = await original<typeof import("../../src/rule/code/generate-rule.js")>();
  return {
    ...own,
    generateRule: (graph: Parameters<typeof own.generateRule>[0]) => {
      read.compiled++;
      return own.generateRule(graph);
    },
  };
});

const { fit, forecast, observations, recurrence, rules, timeToReach } = await import(
  "../../kernel-helpers/index.js"
);
const { bundleOf } = await import("../../kernel-helpers/tables/index.js");

const counts = observations(
  { hour: [0, 1, 2, 3, 4, 5, 6, 7], N: [10, 18, 31, 50, 69, 85, 93, 97] },
  { period: "hour", step: { every: 1, of: "hour" }, value: "N" },
);

test.each([
  ["written out", () => recurrence("ΔN = r*N*(1 - N/K)")],
  ["of the catalogue", () => rules.logistic()],
])("a rule %s is read once and compiled once on its way from the text to the answer", async (_, make) => {
  const before = { texts: read.texts.length, compiled: read.compiled };
  const rule = make();
  const fitted = fit(rule, counts, { errors: "observation" });
  const ahead = forecast(fitted, { periods: 4, paths: 50 });
  const reached = timeToReach(ahead, { risesTo: 98 });
  for (const result of [rule, fitted, ahead, reached]) await bundleOf(result);
  fit(rule, counts, { errors: "process" });
  expect(read.texts.slice(before.texts)).toEqual([rule.text]);
  expect(read.compiled - before.compiled).toBe(1);
  expect(ahead.fit.rule).toBe(rule);
});
