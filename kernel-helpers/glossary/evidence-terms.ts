import { type Term, termsOf } from "./term.js";

const term = termsOf("general");

/** Terms of tests, comparisons and verdicts. */
export const evidenceTerms: readonly Term[] = [
  term(
    "AIC",
    "Akaike's information criterion: fit penalised by the number of parameters. Smaller is better.",
    {
      formula: "-2 log L + 2k, with k including sigma",
      related: ["AICc", "BIC"],
    },
  ),
  term("AICc", "AIC with a correction for short records. Differences matter, not values.", {
    formula: "AIC + 2k(k + 1)/(n - k - 1)",
    mistakenFor: { "p-value": "a difference of AICc is not a probability" },
    related: ["AIC", "Akaike weight", "undecided"],
  }),
  term("Akaike weight", "Relative support of one rule among those compared; weights add up to 1.", {
    otherNames: ["weight of evidence"],
    formula: "exp(-d/2)/sum of exp(-d/2), with d the difference of AICc from the smallest",
    mistakenFor: {
      probability: "not the probability that the rule is true, but its support among these rules",
    },
    related: ["AICc"],
  }),
  term(
    "autocorrelation",
    "Correlation of residuals with those some periods before. It shows structure that a rule misses.",
    {
      otherNames: ["lag-1 autocorrelation", "serial correlation"],
      related: ["Ljung-Box test", "Durbin-Watson statistic"],
    },
  ),
  term("bias", "Mean difference between estimates and the true value.", {
    related: ["parameter recovery", "coverage"],
  }),
  term("BIC", "Bayesian information criterion, with a stronger penalty than AIC. Smaller is better.", {
    formula: "-2 log L + k ln(n)",
    related: ["AIC"],
  }),
  term("change point", "Period from which the parameters of a rule differ.", {
    related: ["density dependence"],
  }),
  term("coverage", "Share of intervals that contain the true value.", {
    mistakenFor: { "confidence level": "the level is the intended coverage" },
    related: ["confidence level", "parameter recovery"],
  }),
  term(
    "CRPS",
    "Continuous ranked probability score: distance between a forecast distribution and the value. Smaller is better.",
    {
      otherNames: ["continuous ranked probability score"],
      unit: "unit of the state",
      related: ["interval score", "rolling origin"],
    },
  ),
  term("density dependence", "Growth that falls as the level rises.", { related: ["carrying capacity"] }),
  term(
    "Durbin-Watson statistic",
    "Statistic for lag-1 autocorrelation: 2 without it, less with positive autocorrelation.",
    {
      otherNames: ["Durbin-Watson"],
      formula: "sum of (e[t] - e[t-1])^2/sum of e[t]^2",
      related: ["autocorrelation"],
    },
  ),
  term("hold-out score", "Forecast error on the last part of the record, which was not used in the fit.", {
    related: ["rolling origin"],
  }),
  term(
    "interval score",
    "Width of a prediction interval plus a penalty for values outside. Smaller is better.",
    {
      formula: "width + 2/(1 - level)*distance outside",
      related: ["coverage", "CRPS"],
    },
  ),
  term("likelihood ratio test", "Test of a rule against a larger rule that contains it.", {
    otherNames: ["likelihood ratio"],
    formula: "2 Δ log L, compared with chi-square",
    related: ["likelihood", "p-value"],
  }),
  term("Ljung-Box test", "Test for autocorrelation of residuals at several lags together.", {
    otherNames: ["Ljung-Box"],
    formula: "n(n + 2)*sum of r[k]^2/(n - k)",
    related: ["autocorrelation"],
  }),
  term(
    "MASE",
    "Mean absolute scaled error: forecast error relative to the naive forecast. Below 1 is better than naive.",
    {
      otherNames: ["mean absolute scaled error"],
      related: ["naive forecast"],
    },
  ),
  term(
    "naive forecast",
    "Forecast without a rule: the last value, the mean level, or the value one season before.",
    {
      otherNames: ["naive rule", "no change", "mean level"],
      related: ["MASE", "none adequate"],
    },
  ),
  term("none adequate", "Verdict that no rule does better than a naive forecast.", {
    related: ["naive forecast", "undecided"],
  }),
  term("p-value", "Probability of a statistic at least this extreme if the tested assumption is true.", {
    mistakenFor: { "probability that the rule is wrong": "it assumes that the rule is right" },
    related: ["likelihood ratio test"],
  }),
  term(
    "parameter recovery",
    "Check that refits to simulated records find the parameters they were simulated with.",
    {
      otherNames: ["recovery"],
      related: ["bias", "coverage", "resamples"],
    },
  ),
  term("residual", "Observed minus fitted value.", {
    otherNames: ["residuals"],
    formula: "e = observed - fitted",
    unit: "unit of the state",
    mistakenFor: { "process error": "a residual also contains observation error" },
    related: ["autocorrelation", "leverage"],
  }),
  term("rival", "Another rule that is compared on the same record.", { related: ["undecided", "AICc"] }),
  term(
    "rolling origin",
    "Evaluation of forecasts made from several earlier ends of the record, with a refit at each.",
    {
      otherNames: ["origins", "origin"],
      related: ["hold-out score", "MASE"],
    },
  ),
  term("runs test", "Test for too few or too many runs of residuals of one sign.", {
    related: ["autocorrelation"],
  }),
  term("Shapiro-Wilk test", "Test for normal residuals.", {
    otherNames: ["Shapiro-Wilk"],
    related: ["residual"],
  }),
  term("supported", "Verdict that the record favours a rule over all rivals by more than the margin.", {
    related: ["undecided", "none adequate"],
  }),
  term(
    "undecided",
    "Verdict that two or more rules are within 2 units of AICc: the record does not distinguish them.",
    {
      mistakenFor: { "equally good": "the rules can differ in forecasts and decisions; report both" },
      related: ["AICc", "next reading"],
    },
  ),
];
