import { type Fit, type FitProblem, type GroupFit, problemOf } from "../../estimate/index.js";
import { chiSquareCdf, chiSquareUpperTail, type RandomStream } from "../../numeric/index.js";
import { autocorrelations } from "../statistics/autocorrelation.js";
import { durbinWatson } from "../statistics/durbin-watson.js";
import { boxPierce, ljungBox } from "../statistics/portmanteau.js";
import { runsTest } from "../statistics/runs-test.js";
import { shapiroWilk } from "../statistics/shapiro-wilk.js";
import { spreadTest } from "../statistics/spread-test.js";
import { residualSeries } from "./residual-series.js";

/** What a residual test looks for. */
export type ResidualTestKind = "autocorrelation" | "normality" | "distribution" | "spread";

/** One look at the residuals of one state. */
export interface ResidualTest {
  readonly state: string;
  readonly kind: ResidualTestKind;
  readonly name: string;
  /** What it asks. */
  readonly question: string;
  readonly statistic: number;
  /** Of a value as far out if the fit were right; undefined where none is computed. */
  readonly probability: number | undefined;
  /** From the probability, or from the limit where there is one. */
  readonly sign: "none" | "weak" | "clear";
  readonly sentence: string;
}

/** Probabilities below which a test speaks weakly and clearly: common practice, no source. */
const weak = 0.05;
const clear = 0.01;

const questions: Readonly<Record<ResidualTestKind, string>> = {
  autocorrelation: "Autocorrelation: do neighbouring residuals move together?",
  normality: "Normality: are the residuals normal?",
  distribution: "Distribution: do the values follow the one that was fitted?",
  spread: "Spread: does the scatter change with the level?",
};

/** What there is evidence of where a test speaks. */
const findings: Readonly<Record<ResidualTestKind, string>> = {
  autocorrelation: "autocorrelation",
  normality: "residuals that are not normal",
  distribution: "another distribution",
  spread: "scatter that changes with the level",
};

/**
 * The residual tests of one group, state by state, of the residuals that the error distribution calls for: differences
 * on the fitting scale of normal errors; randomised quantile residuals of counts and of values known to a limit, which are
 * normal where the distribution is right; a filter's prediction errors over their standard deviations.
 *
 * Neighbouring residuals of one-step fits are correlated by the fit itself, so one degree of freedom a past value
 * that the rule reads is taken off Ljung-Box and Box-Pierce there.
 *
 * @param stream - of randomised quantile residuals.
 */
export function residualTests(fit: Fit, group: GroupFit, stream: RandomStream): readonly ResidualTest[] {
  const { residuals, tested } = problemOf(fit).group(group.group);
  const all = residuals(tested, stream);
  return fit.rule.states.flatMap((state) => testsOfState(fit, group, state, all));
}

function testsOfState(fit: Fit, group: GroupFit, state: string, all: Float64Array): ResidualTest[] {
  const problem = problemOf(fit);
  const own = group.points.map((point, i) => ({ point, residual: all[i]! }));
  const used = own.filter(({ point, residual }) => point.state === state && Number.isFinite(residual));
  const residuals = used.map(({ residual }) => residual);
  const series = residualSeries(
    used.map(({ point }) => point.index),
    residuals,
  );
  const lags = Math.max(1, Math.min(10, Math.floor(residuals.length / 5)));
  const fitted = problem.errors === "process" ? 1 + fit.rule.lags.length : 0;
  const improved = ljungBox(series, lags, fitted);
  const plain = boxPierce(series, lags, fitted);
  const runs = runsTest(residuals);
  const levels = used.map(({ point }) => problem.scale.to(point.fitted));
  return [
    lagOne(state, series, residuals.length),
    testRow(state, "autocorrelation", `Ljung-Box, ${lags} lags`, improved.statistic, improved.probability),
    testRow(state, "autocorrelation", `Box-Pierce, ${lags} lags`, plain.statistic, plain.probability),
    testRow(state, "autocorrelation", "Runs of one sign", runs.runs, runs.probability),
    watson(state, series),
    ...normality(problem, group, state, residuals),
    ...spread(state, residuals, levels),
  ];
}

/**
 * Quantile residuals are standard normal where the distribution is right, whichever it is: in shape, and in variance, of
 * which the shape says nothing. Other residuals are normal where the errors are.
 */
function normality(
  problem: FitProblem,
  group: GroupFit,
  state: string,
  residuals: readonly number[],
): ResidualTest[] {
  const shape = shapiroWilk(residuals);
  const row = (kind: ResidualTestKind, name: string): ResidualTest[] =>
    shape ? [testRow(state, kind, name, shape.statistic, shape.probability)] : [];
  if (problem.group(group.group).tested !== "quantile") return row("normality", "Shapiro-Wilk");
  return [
    ...row("distribution", "Shapiro-Wilk of quantile residuals"),
    ...variance(state, residuals, residuals.length * (1 - group.estimates.length / group.count)),
  ];
}

/** Whether standard normal residuals have the variance 1, two-sided; unknowns that were fitted take up some of it. */
function variance(state: string, residuals: readonly number[], freedom: number): ResidualTest[] {
  if (!(freedom > 0)) return [];
  const squares = residuals.reduce((sum, residual) => sum + residual * residual, 0);
  const tails = [chiSquareUpperTail(squares, freedom), chiSquareCdf(squares, freedom)];
  const probability = 2 * Math.min(...tails);
  return [testRow(state, "distribution", "Variance of quantile residuals", squares / freedom, probability)];
}

/** Levels that differ by no more than rounding have no scatter to change with. */
const rounding = 1e-9;

function spread(state: string, residuals: readonly number[], levels: readonly number[]): ResidualTest[] {
  const [low, high] = [Math.min(...levels), Math.max(...levels)];
  if (!(high - low > rounding * Math.max(Math.abs(low), Math.abs(high)))) return [];
  const { statistic, probability } = spreadTest(residuals, levels);
  return [testRow(state, "spread", "Koenker", statistic, probability)];
}

function testRow(
  state: string,
  kind: ResidualTestKind,
  name: string,
  statistic: number,
  probability: number,
): ResidualTest {
  const sign = probability < clear ? "clear" : probability < weak ? "weak" : "none";
  const evidence = { none: "no evidence", weak: "evidence", clear: "clear evidence" }[sign];
  return {
    state,
    kind,
    name,
    question: questions[kind],
    statistic,
    probability,
    sign,
    sentence: `p ${probabilityText(probability)}, ${evidence} of ${findings[kind]}.`,
  };
}

function lagOne(state: string, series: Float64Array, count: number): ResidualTest {
  const statistic = autocorrelations(series, 1)[0]!;
  const limit = 1.96 / Math.sqrt(count);
  const beyond = Math.abs(statistic) > limit;
  const way = statistic > 0 ? "agree" : "alternate";
  return {
    state,
    kind: "autocorrelation",
    name: "Correlation at lag 1",
    question: questions.autocorrelation,
    statistic,
    probability: undefined,
    sign: beyond ? "weak" : "none",
    sentence: beyond
      ? `Neighbours ${way}: ${statistic.toFixed(2)} lies beyond ±${limit.toFixed(2)} (n = ${count}).`
      : `Within ±${limit.toFixed(2)}, which chance alone gives at n = ${count}.`,
  };
}

function watson(state: string, series: Float64Array): ResidualTest {
  return {
    state,
    kind: "autocorrelation",
    name: "Durbin-Watson",
    question: questions.autocorrelation,
    statistic: durbinWatson(series),
    probability: undefined,
    sign: "none",
    sentence:
      "2 where neighbours are unrelated, less where they agree, more where they alternate; shown beside lag 1.",
  };
}

/** A probability in words that promise no more digits than it has. */
export function probabilityText(probability: number): string {
  return probability < 0.001 ? "below 0.001" : probability.toFixed(3);
}
