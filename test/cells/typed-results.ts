// A sample of what cells write, compiled by the compiler that cells are checked with. Each line marked as an error
// must be one: it proves that the value above it has a type and is not taken for anything at all.
import { DataFrame } from "danfojs-node";
import {
  compare,
  equilibria,
  fit,
  forecast,
  leastSquares,
  matrixGrowth,
  observations,
  readRecord,
  recurrence,
  rules,
  timeToReach,
  trajectory,
} from "periodwise";

const counts = observations(
  { hour: [0, 1, 2, 3, 4, 5], density: [2, 3.9, 7.6, 14, 24, 38] },
  { period: "hour", step: { every: 1, of: "hour" }, value: "density", unit: "10^4 cells/mL" },
);
const rule = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
const parameters: readonly string[] = rule.parameters;
// @ts-expect-error
const parametersAreNoNumber: number = rule.parameters;

const fitted = fit(rule, counts, { errors: "observation", distribution: "lognormal" });
const kind: "fit" = fitted.kind;
// @ts-expect-error
const fitIsNoText: string = fitted;
// @ts-expect-error
fit(rule, counts, { errors: "neither" });
// @ts-expect-error
fit(rule, counts, { errors: "process", distributon: "normal" });

const growth: number = fitted.values.R;
const [least, most]: readonly [number, number] = fitted.interval("R");
const first: number = fitted.group("A").values["N[0]"];
// @ts-expect-error
const estimatesAreNumbers: string = fitted.values.R;
const density: number = counts.last("density");

const rivals = compare([fitted, fitted], { decide: (rival) => `${rival.values.R}` });
// @ts-expect-error
const comparisonIsNoNumber: number = rivals;

const ahead = forecast(fitted, { periods: 12 });
const ready = timeToReach(ahead, { state: "N", risesTo: 60 });
const levels: readonly number[] = ahead.values.N;
const end: number = ahead.last("N") + ahead.fit.values.R;
const when: number | undefined = ready.firstPeriod;
// @ts-expect-error: it may never get there
const always: number = ready.firstPeriod;
const sentence: string = ready.sentence;
// @ts-expect-error
const sentenceIsNoNumber: number = ready.sentence;

const solved = leastSquares({ residuals: ([a = 0]) => Float64Array.of(a - 1), start: [0] });
const estimate: number = solved.estimates[0] ?? Number.NaN;
// @ts-expect-error
const estimatesAreNoText: string = solved.estimates;

async function table(): Promise<DataFrame> {
  const frame = await readRecord("record.csv");
  const rows: number = frame.shape[0] ?? 0;
  // @ts-expect-error
  const shapeIsNoText: string = frame.shape;
  return new DataFrame([[rows, shapeIsNoText]]);
}

const stages = rules.ages({ ages: 3 });
const dominant: number = matrixGrowth(stages, {
  parameters: { f1: 0, f2: 4, f3: 3, s1: 0.5, s2: 0.25 },
}).dominant;
const verdict: "stable" | "unstable" | "undetermined" = equilibria(rule, { parameters: { R: 2, K: 9 } })
  .points[0]!.verdict;
// @ts-expect-error: points are a list, not anything
const levelsAreNoText: string = equilibria(rule, { parameters: { R: 2, K: 9 } }).points;
// @ts-expect-error: parameters are a list of names
const namesAreNoText: string = rules.logistic().parameters;
// @ts-expect-error: a path is asked for in periods
trajectory(stages, { steps: 3 });

export {
  always,
  comparisonIsNoNumber,
  density,
  dominant,
  end,
  estimate,
  estimatesAreNoText,
  estimatesAreNumbers,
  first,
  fitIsNoText,
  growth,
  kind,
  least,
  levels,
  levelsAreNoText,
  most,
  namesAreNoText,
  parameters,
  parametersAreNoNumber,
  sentence,
  sentenceIsNoNumber,
  table,
  verdict,
  when,
};
