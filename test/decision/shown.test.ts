import { describe, expect, test } from "vitest";
import {
  fit,
  forecast,
  nextReading,
  observations,
  optimize,
  recurrence,
  sensitivity,
  simulate,
  solveFor,
  timeToReach,
  tradeoff,
} from "../../kernel-helpers/index.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";

const stock = recurrence("stock[t+1] = stock + ordered - used", { units: { stock: "coils" } });
const given = {
  parameters: { ordered: 10, used: 10 },
  initial: { stock: 20 },
  periods: 12,
  noise: { stock: { distribution: "normal", sd: 3 } },
  paths: 400,
  period: "week",
} as const;
const out = { probability: "stock", fallsTo: 0 } as const;
const flasks = observations(
  {
    flask: [..."AAAAAAABBBBBBB"],
    hour: [0, 1, 2, 3, 4, 5, 6, 0, 1, 2, 3, 4, 5, 6],
    N: [10, 13, 16.5, 22, 28, 36.5, 47, 9, 11.4, 15, 19, 24, 30.5, 39],
  },
  { period: "hour", step: { every: 1, of: "hour" }, by: "flask", value: "N", unit: "10^4 cells/mL" },
);
const grown = fit(recurrence("N[t+1] = R*N"), flasks, { errors: "observation", distribution: "lognormal" });

const shown = async (value: unknown): Promise<string> => `${(await bundleOf(value))!["text/plain"]}`;

describe("what is shown of a decision has its numbers and its sentence", () => {
  test("reaches: every group, and the sentence", async () => {
    const found = timeToReach(forecast(grown, { periods: 8, paths: 200 }), {
      risesTo: 120,
    });
    const text = await shown(found);
    expect(text).toContain("When N reaches 120 ×10⁴ cells/mL by the rule N[t+1] = R*N");
    expect(text).toContain(found.sentence.slice(0, 60));
    expect(text).toMatch(/\bA\b[\s\S]*\bB\b/);
  });

  test("forecast: some rows of every group", async () => {
    const text = await shown(forecast(grown, { periods: 20, paths: 200 }));
    expect(text).toMatch(/^ *A .*\n/m);
    expect(text).toMatch(/^ *B .*\n/m);
    expect(text).toContain("9 of 20 periods ahead are shown, evenly spread.");
  });

  test("simulate: a scenario's paths, and the seed", async () => {
    const text = await shown(simulate(stock, given));
    expect(text).toContain("400 simulated paths, seed 1");
    expect(text).toContain("95% of paths, from");
  });

  test.each([
    [
      "solveFor",
      () =>
        solveFor(stock, {
          ...given,
          vary: "stock[0]",
          range: [5, 80],
          multiple: 1,
          until: { ...out, atMost: 0.1 },
        }),
    ],
    [
      "best",
      () => optimize(stock, { ...given, vary: "ordered", range: [5, 15], minimize: { highest: "stock" } }),
    ],
    ["sensitivity", () => sensitivity(stock, { ...given, answer: { level: "stock", at: 5 } })],
    [
      "nextReading",
      () => nextReading(grown, { periods: 4, group: "A", paths: 100, answer: { parameter: "R" } }),
    ],
  ])("%s: the sentence", async (_, ask) => {
    const found = ask();
    expect(await shown(found)).toContain(found.sentence.slice(0, 50));
  });

  test("tradeoff: each risk with its Monte-Carlo error", async () => {
    const found = tradeoff(stock, {
      ...given,
      vary: "ordered",
      values: [9, 10, 11],
      answers: { "runs out": out },
    });
    const text = await shown(found);
    expect(text).toContain("Monte-Carlo error");
    expect(text).toContain("runs out: the probability that stock falls to 0 coils.");
  });
});
