import { describe, expect, test } from "vitest";
import { compare, fit, observations, recurrence, rules } from "../../kernel-helpers/index.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";
import type { FitOptions } from "../../src/estimate/index.js";
import { fitLabels } from "../../src/evidence/compare/fit-labels.js";

const counts = observations(
  {
    flask: [..."AAAAAAAABBBBBBBBCCCCCCCC"],
    hour: [0, 1, 2, 3, 4, 5, 6, 7, 0, 1, 2, 3, 4, 5, 6, 7, 0, 1, 2, 3, 4, 5, 6, 7],
    N: [10, 14, 19, 27, 36, 44, 57, 66, 9, 12, 17, 23, 31, 41, 52, 63, 11, 14, 21, 28, 38, 49, 60, 71],
  },
  { period: "hour", step: { every: 1, of: "hour" }, by: "flask", value: "N" },
);
const crowding = recurrence("ΔN = r*N*(1 - N/K)", { name: "crowding" });
const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)", { name: "sheltered" });
const unnamed = recurrence("ΔN = r*N*(1 - N/K)");
const of = (rule: typeof crowding, more: Partial<FitOptions> = {}): ReturnType<typeof fit> =>
  fit(rule, counts, { errors: "observation", intervals: "none", ...more });

describe("rivals are called by what differs", () => {
  test.each([
    ["rule", [of(crowding), of(sheltered)], ["crowding", "sheltered"]],
    [
      "distribution",
      [of(crowding, { distribution: "lognormal" }), of(crowding)],
      ["crowding, lognormal", "crowding, normal"],
    ],
    [
      "rule and distribution",
      [of(crowding, { distribution: "lognormal" }), of(sheltered)],
      ["crowding, lognormal", "sheltered, normal"],
    ],
    [
      "place of the error",
      [of(unnamed), of(unnamed, { errors: "process" })],
      ["ΔN = r*N*(1 - N/K), error in the observation", "ΔN = r*N*(1 - N/K), error in the process"],
    ],
    [
      "groups",
      [of(crowding), of(crowding, { groups: "combined" })],
      ["crowding, groups separate", "crowding, groups combined"],
    ],
    [
      "held parameters",
      [of(crowding), of(crowding, { fixed: { K: 90 } })],
      ["crowding", "crowding, K held at 90"],
    ],
    [
      "rules of one name",
      [of(crowding), of(recurrence("N[t+1] = R*N", { name: "crowding" }))],
      ["crowding, ΔN = r*N*(1 - N/K)", "crowding, N[t+1] = R*N"],
    ],
    [
      "nothing that can be said",
      [of(crowding), of(crowding), of(sheltered)],
      ["crowding, no. 1", "crowding, no. 2", "sheltered"],
    ],
  ])("%s", (_, fits, labels) => {
    expect(fitLabels(fits)).toEqual(labels);
  });
});

describe("a comparison by its labels", () => {
  const compared = compare([of(crowding, { distribution: "lognormal" }), of(crowding)]);

  test("rows, verdict, scores and sentence say them, and never the same one twice", () => {
    expect(compared.rows.map(({ rule }) => rule).sort()).toEqual(["crowding, lognormal", "crowding, normal"]);
    expect(compared.rollingOrigin!.scores.slice(0, 2).map(({ name }) => name)).toEqual([
      "crowding, lognormal",
      "crowding, normal",
    ]);
    for (const name of compared.verdict.rules) expect(compared.sentence).toContain(`"${name}"`);
    const quoted = [...compared.sentence.matchAll(/"([^"]+)" and "([^"]+)"/g)];
    for (const [, one, other] of quoted) expect(one).not.toBe(other);
  });

  test("the same fit given twice is told apart by number", () => {
    const twice = of(crowding);
    expect(compare([twice, twice]).sentence).toContain('"crowding, no. 1" and "crowding, no. 2"');
  });

  test("what each decides goes by the same labels", () => {
    const decided = compare([of(crowding), of(sheltered)], { decide: () => "wait" });
    for (const { rule } of decided.decisions) expect(["crowding", "sheltered"]).toContain(rule);
  });

  test("the table has the lines of named rules in its notes", async () => {
    const text = `${(await bundleOf(compared))!["text/plain"]}`;
    expect(text).toContain('Rule "crowding": ΔN = r*N*(1 - N/K).');
  });
});

describe("a rule's name", () => {
  test("is that of the catalogue unless one is given", () => {
    expect(rules.bevertonHolt().name).toBe("Beverton-Holt");
    expect(rules.bevertonHolt({ name: "sheltered" }).name).toBe("sheltered");
    expect(recurrence("N[t+1] = R*N").name).toBeUndefined();
  });

  test("stands in titles instead of the lines", async () => {
    const text = `${(await bundleOf(fit(crowding, counts, { errors: "observation" })))!["text/plain"]}`;
    expect(text).toContain("Estimates of crowding");
    expect(`${(await bundleOf(crowding))!["text/plain"]}`).toContain("crowding: ΔN = r*N*(1 - N/K)");
  });

  test.each([[5], [""], [null]])("%j is an error", (name) => {
    expect(() => recurrence("N[t+1] = R*N", { name: name as string })).toThrow(
      /^Option `name` must be a (text|non-empty string)/,
    );
  });
});
