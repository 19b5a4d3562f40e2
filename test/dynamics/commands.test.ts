import { expect, test } from "vitest";
import * as helpers from "../../kernel-helpers/index.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";

const { recurrence, rules } = helpers;
const map = recurrence("x[t+1] = r*x*(1 - x)");
const matrix = rules.ages({ ages: 3 });
const loan = recurrence("interest = i*owed\nΔowed = interest - p", { units: { owed: "EUR" } });
const at = { parameters: { r: 3.2 }, initial: { x: 0.3 } };

/** One of each, and a text that its display must hold. */
const shown: readonly (readonly [string, unknown, RegExp])[] = [
  ["a rule", loan, /Order of events: interest, then owed at t\+1/u],
  ["a named rule", rules.bevertonHolt(), /Beverton and Holt \(1957\)/u],
  [
    "a path",
    helpers.trajectory(loan, { parameters: { i: 0.1, p: 20 }, initial: { owed: 100 }, periods: 3 }),
    /interest/u,
  ],
  [
    "an exact path",
    helpers.exactTrajectory(recurrence("x[t+1] = x/3"), { initial: { x: 1 }, periods: 2 }),
    /1\/9/u,
  ],
  ["a closed form", helpers.closedForm(recurrence("x[t+1] = 2*x"), { initial: { x: 3 } }), /3\*2\^t/u],
  ["equilibria", helpers.equilibria(map, { parameters: { r: 2.5 }, range: [0, 1] }), /0\.6/u],
  [
    "cycles",
    helpers.cycles(map, { parameters: { r: 3.2 }, period: 2, range: [0, 1] }),
    /0\.5130445, 0\.7994555/u,
  ],
  ["bifurcations", helpers.bifurcations(map, { vary: "r", range: [2.9, 3.1], initial: 0.3 }), /flip/u],
  ["an exponent", helpers.lyapunovExponent(map, { ...at, periods: 3000 }), /-0\.916/u],
  [
    "a horizon",
    helpers.predictionHorizon(map, { ...at, error: 0.01, tolerance: 0.1, periods: 3000 }),
    /no end/u,
  ],
  [
    "an attractor",
    helpers.attractor(map, { vary: "r", values: { from: 3, to: 4, count: 5 }, periods: 4, initial: [0.3] }),
    /Long-run values of x/u,
  ],
  ["a cobweb", helpers.cobweb(map, at), /Next value against present value/u],
  [
    "basins",
    helpers.basins(rules.allee(), { parameters: { r: 0.2, K: 100, A: 20 }, range: [0, 110], count: 40 }),
    /Borders: 20/u,
  ],
  [
    "a matrix",
    helpers.matrixGrowth(matrix, { parameters: { f1: 0, f2: 4, f3: 3, s1: 0.5, s2: 0.25 } }),
    /1\.5 a period/u,
  ],
];

test.each(shown)("%s shows itself", async (_, value, text) => {
  const bundle = await bundleOf(value);
  expect(bundle!["text/plain"]).toMatch(text);
  expect(bundle!["text/html"]).toMatch(/</u);
});

test("a rule carries its TeX", async () => {
  const bundle = await bundleOf(rules.geometric());
  expect(bundle!["text/latex"]).toContain("x_{t+1} = R\\,x_{t}");
});
