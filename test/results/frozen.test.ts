import { describe, expect, test } from "vitest";
import * as periodwise from "../../kernel-helpers/index.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";

const {
  attractor,
  basins,
  bifurcations,
  bootstrap,
  changePoint,
  check,
  closedForm,
  cobweb,
  compare,
  correct,
  cycles,
  decisionsLog,
  densityDependence,
  differences,
  equilibria,
  estimates,
  exactTrajectory,
  explain,
  figure,
  fit,
  forecast,
  gridInterval,
  leastSquares,
  loadResult,
  lyapunovExponent,
  matrixGrowth,
  nextReading,
  numberFormat,
  observations,
  optimize,
  points,
  predictionHorizon,
  propose,
  recurrence,
  rules,
  sameParameters,
  saveResult,
  sensitivity,
  simulate,
  solveFor,
  summary,
  table,
  timeToReach,
  tradeoff,
  trajectory,
  updateFit,
} = periodwise;

/** Functions that give a frame of another library, a text or nothing; a frame is not ours to freeze. */
const others = [
  "answer",
  "closeCase",
  "correct",
  "distributions",
  "expanding",
  "fill",
  "frame",
  "longer",
  "ModelError",
  "openCase",
  "progress",
  "readRecord",
  "saveResult",
  "rolling",
  "shift",
  "show",
  "sourceOf",
  "tabSeparated",
  "toPeriods",
  "undo",
  "wider",
  "withProgress",
  "writeRecord",
];

const hourly = { period: "hour", step: { every: 1, of: "hour" }, value: "N" } as const;
const levels = [10, 18, 31, 50, 69, 85, 93, 97, 99, 100, 98, 101, 99, 100, 102, 99, 100, 101, 98, 100];
const record = { hour: levels.map((_, i) => i), N: levels };
const counts = observations(record, hourly);
const later = observations({ hour: [20, 21], N: [100, 99] }, hourly);
const crowding = recurrence("ΔN = r*N*(1 - N/K)");
const parameters = { r: 0.8, K: 100 };
const loan = recurrence("owed[t+1] = owed*(1 + i) - payment");
const owing = { parameters: { i: 0.01, payment: 100 }, initial: { owed: 1000 }, periods: 12 };
const fitted = fit(crowding, counts, { errors: "observation" });
const growth = fit(rules.gompertz(), counts, { errors: "observation" });
const stepwise = fit(crowding, counts, { errors: "process" });
const ahead = forecast(fitted, { periods: 4, paths: 50 });
const flask = levels.flatMap(() => ["A", "B"]);
const inFlasks = { flask, hour: levels.flatMap((_, i) => [i, i]), N: levels.flatMap((N) => [N, 2 * N]) };
const flasks = fit(crowding, observations(inFlasks, { ...hourly, by: "flask" }), { errors: "observation" });

const results: Readonly<Record<string, () => unknown>> = {
  attractor: () =>
    attractor(rules.logistic(), { vary: "r", values: [2, 2.5], parameters, periods: 4, initial: 30 }),
  basins: () => basins(rules.allee(), { parameters: { r: 0.2, K: 100, A: 20 }, range: [0, 110] }),
  bifurcations: () =>
    bifurcations(recurrence("x[t+1] = r*x*(1 - x)"), { vary: "r", range: [2.8, 3.3], initial: 0.3 }),
  bootstrap: () => bootstrap(fitted, { resamples: 20 }),
  changePoint: () => changePoint(recurrence("N[t+1] = R*N"), counts, { resamples: 19 }),
  check: () => check(fitted, { resamples: 50 }),
  closedForm: () => closedForm(rules.affine(), { parameters: { a: 0.5, b: 1 }, initial: { x: 0 } }),
  cobweb: () => cobweb(crowding, { parameters, initial: { N: 10 }, periods: 4 }),
  compare: () => compare([fitted, growth]),
  cycles: () => cycles(recurrence("x[t+1] = 3.2*x*(1 - x)"), { period: 2, range: [0, 1] }),
  decisionsLog: () => decisionsLog(correct(record, { row: 4, why: "flask shaken" })),
  densityDependence: () => densityDependence(counts, { resamples: 19 }),
  differences: () => differences(counts),
  equilibria: () => equilibria(crowding, { parameters }),
  estimates: () => estimates(fitted),
  exactTrajectory: () => exactTrajectory(loan, owing),
  explain: () => explain("fill rate"),
  figure: () =>
    figure({
      title: "F",
      x: { title: "x" },
      y: { title: "y" },
      layers: [{ mark: "line", name: "a", x: [0, 1], y: [1, 2] }],
    }),
  fit: () => fitted,
  forecast: () => ahead,
  gridInterval: () => gridInterval(stepwise, "r", { resamples: 20 }),
  leastSquares: () => leastSquares({ residuals: ([a = 0]) => Float64Array.of(a - 1, a - 2), start: [0] }),
  lyapunovExponent: () =>
    lyapunovExponent(recurrence("x[t+1] = 2.5*x*(1 - x)"), { initial: { x: 0.3 }, periods: 3000 }),
  matrixGrowth: () =>
    matrixGrowth(rules.ages({ ages: 3 }), { parameters: { f1: 0, f2: 4, f3: 3, s1: 0.5, s2: 0.25 } }),
  nextReading: () => nextReading(fitted, { periods: 4, paths: 50, answer: { parameter: "K" } }),
  numberFormat: () => numberFormat("standard"),
  observations: () => counts,
  optimize: () =>
    optimize(loan, { ...owing, vary: "payment", range: [50, 200], minimize: { highest: "owed" } }),
  points: () => points(fitted),
  predictionHorizon: () =>
    predictionHorizon(recurrence("x[t+1] = 2.5*x*(1 - x)"), {
      initial: { x: 0.3 },
      error: 0.001,
      tolerance: 0.1,
    }),
  propose: () => propose(counts, { errors: "observation" }),
  recurrence: () => crowding,
  rules: () => rules.perishable({ life: 3 }),
  sensitivity: () => sensitivity(loan, { ...owing, answer: { level: "owed", at: 12 } }),
  simulate: () => simulate(loan, { ...owing, noise: { owed: { distribution: "normal", sd: 3 } }, paths: 20 }),
  solveFor: () => solveFor(loan, { ...owing, vary: "payment", until: { level: "owed", at: 12, is: 0 } }),
  summary: () => summary(fitted),
  table: () => table({ title: "T", columns: [{ key: "n", label: "n", kind: "integer" }], rows: [{ n: 1 }] }),
  timeToReach: () => timeToReach(ahead, { risesTo: 90 }),
  tradeoff: () =>
    tradeoff(loan, {
      ...owing,
      vary: "payment",
      values: [90, 110],
      answers: { left: { level: "owed", at: 12 } },
    }),
  loadResult: () => loadResult(saveResult(ahead)),
  sameParameters: () => sameParameters(flasks),
  trajectory: () => trajectory(crowding, { parameters, initial: { N: 10 }, periods: 4 }),
  updateFit: () => updateFit(fitted, later),
};

/** Paths of the lists and records inside a result that are not frozen. */
function open(value: unknown, path = "result", seen = new Set<unknown>()): string[] {
  if (typeof value !== "object" || value === null || ArrayBuffer.isView(value) || seen.has(value)) return [];
  seen.add(value);
  const inside = Object.entries(value).flatMap(([name, part]) => open(part, `${path}.${name}`, seen));
  return Object.isFrozen(value) ? inside : [path, ...inside];
}

describe("every public result is frozen to its last part", () => {
  test.each(Object.entries(results))("%s", (_, ask) => {
    expect(open(ask())).toEqual([]);
  });

  const plain = ["estimates", "leastSquares", "numberFormat", "points", "summary"];
  test.each(Object.entries(results).filter(([name]) => !plain.includes(name)))(
    "%s shows itself",
    async (_, ask) => {
      expect(await bundleOf(ask())).toHaveProperty("text/plain");
    },
  );

  test("no public function is left out", () => {
    const functions = Object.entries(periodwise).flatMap(([name, value]) =>
      typeof value === "object" || typeof value === "function" ? [name] : [],
    );
    expect([...Object.keys(results), ...others].sort()).toEqual(functions.sort());
  });
});

describe("what the caller holds is neither frozen nor kept", () => {
  test("options of a fit and of a rule", () => {
    const bounds: Record<string, readonly [number, number]> = { r: [0, 5] };
    const made = fit(crowding, counts, { errors: "observation", bounds });
    bounds["K"] = [0, 1];
    expect(made.options.bounds).toEqual({ r: [0, 5] });
    const units: Record<string, string> = { N: "cells" };
    const rule = recurrence("N[t+1] = R*N", { units });
    units["R"] = "1";
    expect(rule.units).toEqual({ N: "cells" });
  });

  test("steps of a record, plans of inputs, levels of bands", () => {
    const step = { every: 1, of: "hour" as const };
    const made = observations(record, { ...hourly, step });
    expect(Object.isFrozen(made.axis.step)).toBe(true);
    const plan = { payment: [10, 10, 10, 10] };
    const bands = [0.8];
    const run = simulate(recurrence("owed[t+1] = owed - payment", { inputs: ["payment"] }), {
      initial: { owed: 100 },
      periods: 3,
      inputs: plan,
      levels: bands,
    });
    plan.payment[0] = 99;
    bands.push(0.5);
    step.every = 2;
    expect(run.groups[0]!.plans).toEqual({ payment: [10, 10, 10, 10] });
    expect(run.options.levels).toEqual([0.8]);
    expect(made.axis.step.every).toBe(1);
  });

  test("rows of a table and lists of a figure", () => {
    const rows = [{ n: 1 }];
    const x = [0, 1];
    const made = table({ title: "T", columns: [{ key: "n", label: "n", kind: "integer" }], rows });
    const drawn = figure({
      title: "F",
      x: { title: "x" },
      y: { title: "y" },
      layers: [{ mark: "line", name: "a", x, y: [1, 2] }],
    });
    rows[0]!.n = 2;
    rows.push({ n: 3 });
    x[0] = 7;
    expect(made.rows).toEqual([{ n: 1 }]);
    expect(drawn.panels[0]!.layers[0]).toMatchObject({ x: [0, 1] });
  });
});
