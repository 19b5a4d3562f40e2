import { type Term, termsOf } from "./term.js";

const term = termsOf("general");

/** Terms of parameter estimation. */
export const fittingTerms: readonly Term[] = [
  term("between-group sd", "Standard deviation of a parameter between groups, in a mixed fit.", {
    unit: "unit of the parameter",
    mistakenFor: { "standard error": "it describes the groups, not the precision of an estimate" },
    related: ["group"],
  }),
  term("bootstrap", "Interval from many refits to resampled or simulated records.", {
    otherNames: ["bootstrap interval"],
    mistakenFor: { "profile interval": "a profile follows the likelihood of the one record" },
    related: ["resamples", "profile interval"],
  }),
  term("bounds", "Lower and upper limit of a parameter or state.", {
    mistakenFor: { interval: "bounds are given by the analyst; an interval comes from the record" },
    related: ["parameter", "state"],
  }),
  term(
    "censored value",
    "A reading of which only a limit is known: below detection, above range, or sold out.",
    {
      otherNames: ["censored", "detection limit"],
      mistakenFor: { "missing value": "a censored value has information; a missing one has none" },
      related: ["censored demand", "likelihood"],
    },
  ),
  term("combined fit", "Fit of several groups with the same parameters.", {
    mistakenFor: { "separate fit": "a separate fit has its own parameters for each group" },
    related: ["group"],
  }),
  term("confidence interval", "Range of parameter values that agree with the record at a confidence level.", {
    otherNames: ["interval"],
    mistakenFor: { "prediction band": "a band is for future values, and is wider" },
    related: ["confidence level", "profile interval", "Wald interval"],
  }),
  term(
    "confidence level",
    "Share of intervals that contain the true value when records are repeated; 0.95 by default.",
    {
      otherNames: ["level", "levels"],
      mistakenFor: { "p-value": "small p-values are evidence; high levels are wide intervals" },
      related: ["confidence interval", "coverage"],
    },
  ),
  term(
    "correlation of estimates",
    "Correlation between the errors of two estimates. Near 1 or -1 only a combination of them is known.",
    {
      related: ["not determined"],
    },
  ),
  term(
    "distribution",
    "Distribution of the error: normal, lognormal, Poisson, negative binomial or binomial.",
    {
      otherNames: ["error distribution"],
      related: ["observation error", "lognormal distribution", "Poisson distribution"],
    },
  ),
  term("estimate", "Value of a parameter that fits the record best.", {
    otherNames: ["estimates"],
    related: ["standard error", "confidence interval"],
  }),
  term("fit", "Estimation of the parameters of a rule from a record.", {
    related: ["observation error", "process error", "residual"],
  }),
  term("fixed", "Parameter held at a given value in a fit.", { related: ["parameter"] }),
  term("group", "One series of a record with several, such as one flask or one account.", {
    otherNames: ["series"],
    related: ["combined fit", "between-group sd"],
  }),
  term("initial state", "Value of a state at the first period; estimated unless it is given.", {
    otherNames: ["initial", "initial value"],
    mistakenFor: { start: "a start is where a search begins" },
    related: ["state"],
  }),
  term("leverage", "Influence of one observation on its own fitted value, between 0 and 1.", {
    formula: "diagonal of X(X'X)^-1 X'",
    related: ["residual", "influence"],
  }),
  term("influence", "Change of an estimate when one observation is left out.", { related: ["leverage"] }),
  term("likelihood", "Probability of the record given the parameters, as a function of the parameters.", {
    otherNames: ["log-likelihood"],
    related: ["profile likelihood", "AICc"],
  }),
  term(
    "lognormal distribution",
    "Distribution of a value whose logarithm is normal: errors are relative, and values positive.",
    {
      otherNames: ["lognormal"],
      related: ["distribution"],
    },
  ),
  term("mixed fit", "Fit in which a parameter varies between groups with a mean and a between-group sd.", {
    otherNames: ["mixed"],
    related: ["between-group sd", "combined fit"],
  }),
  term("multi-step pair", "Two observations more than one period apart, with a gap between them.", {
    related: ["gap", "process error"],
  }),
  term(
    "negative binomial distribution",
    "Distribution of counts that vary more than a Poisson distribution.",
    {
      otherNames: ["negative binomial"],
      formula: "variance = mean + mean^2/size",
      related: ["Poisson distribution"],
    },
  ),
  term(
    "not determined",
    "A parameter that the record cannot pin down: practically non-identifiable. Its profile does not pass the cut-off on both sides, so no standard error is given.",
    {
      otherNames: [
        "not determined by this record",
        "non-identifiable",
        "practically non-identifiable",
        "identifiability",
      ],
      mistakenFor: { zero: "the record says nothing about the parameter; it does not say that it is zero" },
      related: ["profile interval", "correlation of estimates"],
    },
  ),
  term(
    "observation error",
    "Difference between a reading and the true state. It does not change later values.",
    {
      otherNames: ["measurement error", "observation"],
      mistakenFor: { "process error": "a process error changes the state and so all later values" },
      related: ["process error", "trajectory fit", "state-space model"],
    },
  ),
  term("one-step fit", "Fit of each value on the observed value before it, for process error.", {
    mistakenFor: { "trajectory fit": "a trajectory fit matches the whole series from one initial state" },
    related: ["process error", "trajectory fit"],
  }),
  term("optimum", "Parameter values at which the fit criterion is best.", { related: ["estimate", "start"] }),
  term("outlier", "A reading far from the rest. A robust fit gives it less weight.", {
    related: ["robust fit", "residual"],
  }),
  term("parameter", "A constant of a rule, estimated from the record or fixed.", {
    otherNames: ["parameters"],
    mistakenFor: { state: "a state changes from period to period", input: "an input is recorded by period" },
    related: ["estimate", "fixed", "bounds"],
  }),
  term(
    "Poisson distribution",
    "Distribution of counts of independent events; its variance equals its mean.",
    {
      otherNames: ["Poisson"],
      formula: "P(k) = exp(-m)*m^k/k!",
      related: ["negative binomial distribution"],
    },
  ),
  term(
    "process error",
    "Random change of the state itself in a period, which is carried on to later periods.",
    {
      otherNames: ["process noise", "process"],
      mistakenFor: { "observation error": "an observation error affects one reading only" },
      related: ["observation error", "one-step fit", "state-space model"],
    },
  ),
  term(
    "profile interval",
    "Interval of parameter values whose profile stays below the cut-off. It can be asymmetric or one-sided.",
    {
      formula: "(RSS(v) - RSS)/s^2 <= F(level; 1, n - p) in least squares",
      mistakenFor: {
        "Wald interval": "a Wald interval is symmetric and valid only near a parabolic profile",
      },
      related: ["profile likelihood", "not determined"],
    },
  ),
  term("profile likelihood", "Best fit for each fixed value of one parameter, with all others refitted.", {
    otherNames: ["profile"],
    related: ["profile interval"],
  }),
  term(
    "resamples",
    "Number of refits to resampled or simulated records in a bootstrap or a recovery check.",
    {
      related: ["bootstrap", "parameter recovery"],
    },
  ),
  term("robust fit", "Fit that gives outliers less weight.", {
    otherNames: ["robust"],
    related: ["outlier"],
  }),
  term("standard error", "Standard deviation of an estimate over repeated records.", {
    otherNames: ["SE"],
    formula: "square root of the diagonal of s^2 (J'J)^-1, with s^2 = RSS/(n - p)",
    unit: "unit of the parameter",
    mistakenFor: {
      "standard deviation": "the sd describes readings; the standard error describes the estimate",
    },
    related: ["confidence interval", "estimate"],
  }),
  term("start", "Value at which the search of a fit begins.", {
    otherNames: ["starting value"],
    mistakenFor: { "initial state": "the initial state is the value of a state at the first period" },
    related: ["optimum"],
  }),
  term("state-space model", "Model with both process and observation error, fitted with a Kalman filter.", {
    otherNames: ["Kalman filter"],
    related: ["process error", "observation error", "innovation"],
  }),
  term("innovation", "Difference between an observation and its one-step prediction in a Kalman filter.", {
    related: ["state-space model", "residual"],
  }),
  term("sigma", "Residual standard deviation of a fit.", {
    otherNames: ["residual standard deviation"],
    formula: "sqrt(RSS/(n - p))",
    related: ["residual", "standard error"],
  }),
  term("sum of squares", "Sum of the squared residuals, which least squares minimises.", {
    otherNames: ["RSS", "residual sum of squares"],
    related: ["residual", "sigma"],
  }),
  term("trajectory fit", "Fit of the whole series from one initial state, for observation error.", {
    mistakenFor: { "one-step fit": "a one-step fit starts again from every observed value" },
    related: ["observation error", "initial state"],
  }),
  term("update", "Fit of an earlier record with later rows added (`updateFit`).", {
    otherNames: ["updateFit"],
    related: ["fit"],
  }),
  term("Wald interval", "Estimate plus and minus a quantile times the standard error.", {
    formula: "estimate ± t(n - p)*SE",
    mistakenFor: { "profile interval": "a profile interval follows the shape of the likelihood" },
    related: ["standard error", "profile interval"],
  }),
  term("weight", "Number by which the squared residual of an observation is multiplied; 0 leaves it out.", {
    otherNames: ["weights"],
    related: ["residual"],
  }),
];
