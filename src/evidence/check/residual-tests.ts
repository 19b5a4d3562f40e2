import { type Fit, type GroupFit, problemOf } from "../../estimate/index.js";
import { autocorrelations } from "../statistics/autocorrelation.js";
import { durbinWatson } from "../statistics/durbin-watson.js";
import { boxPierce, ljungBox } from "../statistics/portmanteau.js";
import { runsTest } from "../statistics/runs-test.js";
import { shapiroWilk } from "../statistics/shapiro-wilk.js";
import { spreadTest } from "../statistics/spread-test.js";
import { residualSeries } from "./residual-series.js";

/** One look at the residuals of one state. */
export interface ResidualTest {
  readonly state: string;
  readonly name: string;
  /** What it asks. */
  readonly question: string;
  readonly statistic: number;
  /** Of a value as far out if the residuals were independent, even and normal; undefined where none is computed. */
  readonly probability: number | undefined;
  /** From the probability, or from the limit where there is one. */
  readonly sign: "none" | "weak" | "clear";
  readonly sentence: string;
}

/** Probabilities below which a test speaks weakly and clearly: common practice, no source. */
const weak = 0.05;
const clear = 0.01;

/**
 * The residual tests of one group, state by state.
 *
 * Neighbouring residuals of one-step fits are correlated by the fit itself, so one degree of freedom a past value
 * that the rule reads is taken off Ljung-Box and Box-Pierce there.
 */
export function residualTests(fit: Fit, group: GroupFit): readonly ResidualTest[] {
  return fit.rule.states.flatMap((state) => testsOfState(fit, group, state));
}

function testsOfState(fit: Fit, group: GroupFit, state: string): ResidualTest[] {
  const points = group.points.filter((point) => point.state === state);
  const residuals = points.map((point) => point.residual);
  const series = residualSeries(group, state);
  const lags = Math.max(1, Math.min(10, Math.floor(residuals.length / 5)));
  const { errors, scale } = problemOf(fit);
  const fitted = errors === "process" ? 1 + fit.rule.lags.length : 0;
  const levels = points.map((point) => scale.to(point.fitted));
  const improved = ljungBox(series, lags, fitted);
  const plain = boxPierce(series, lags, fitted);
  const runs = runsTest(residuals);
  const normal = shapiroWilk(residuals);
  const spread = spreadTest(residuals, levels);
  const made = (name: string, question: string, statistic: number, probability: number): ResidualTest =>
    testRow(state, name, question, statistic, probability);
  return [
    lagOne(state, series, residuals.length),
    made(
      `Ljung-Box, ${lags} lags`,
      "Do residuals of different periods go together?",
      improved.statistic,
      improved.probability,
    ),
    made(
      `Box-Pierce, ${lags} lags`,
      "Do residuals of different periods go together?",
      plain.statistic,
      plain.probability,
    ),
    made("Runs of one sign", "Do residuals of one sign come in runs?", runs.runs, runs.probability),
    watson(state, series),
    ...(normal
      ? [made("Shapiro-Wilk", "Are the residuals normal?", normal.statistic, normal.probability)]
      : []),
    made("Spread on level", "Does the scatter change with the level?", spread.statistic, spread.probability),
  ];
}

function testRow(
  state: string,
  name: string,
  question: string,
  statistic: number,
  probability: number,
): ResidualTest {
  const sign = probability < clear ? "clear" : probability < weak ? "weak" : "none";
  const told = { none: "No sign of it", weak: "A weak sign of it", clear: "A clear sign of it" }[sign];
  const denial = { none: "Yes, as far as can be seen", weak: "Perhaps not", clear: "No" }[sign];
  const answer = name === "Shapiro-Wilk" ? denial : told;
  return {
    state,
    name,
    question,
    statistic,
    probability,
    sign,
    sentence: `${answer} (p ${probabilityText(probability)}).`,
  };
}

function lagOne(state: string, series: Float64Array, count: number): ResidualTest {
  const statistic = autocorrelations(series, 1)[0]!;
  const limit = 1.96 / Math.sqrt(count);
  const beyond = Math.abs(statistic) > limit;
  const way = statistic > 0 ? "agree" : "alternate";
  return {
    state,
    name: "Correlation at lag 1",
    question: "Do neighbouring residuals go together?",
    statistic,
    probability: undefined,
    sign: beyond ? "weak" : "none",
    sentence: beyond
      ? `Neighbours ${way}: ${statistic.toFixed(2)} lies beyond ±${limit.toFixed(2)} (n = ${count}).`
      : `Within ±${limit.toFixed(2)}, which chance alone gives at n = ${count}.`,
  };
}

function watson(state: string, series: Float64Array): ResidualTest {
  const statistic = durbinWatson(series);
  return {
    state,
    name: "Durbin-Watson",
    question: "Do neighbouring residuals go together?",
    statistic,
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
