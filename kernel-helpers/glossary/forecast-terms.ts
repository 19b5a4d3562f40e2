import { type Term, termsOf } from "./term.js";

const term = termsOf("general");

/** Terms of forecasts and decisions. */
export const forecastTerms: readonly Term[] = [
  term("byGroup", "Plan of an input by group: `{ byGroup: { A: 100, B: 300 } }`.", {
    related: ["plan", "group"],
  }),
  term("elasticity", "Relative change of an answer for a relative change of one parameter.", {
    formula: "(d answer/d p)*(p/answer)",
    unit: "dimensionless",
    related: ["sensitivity"],
  }),
  term("fallsTo", "Option for a state that falls to a value: `fallsTo: 0`.", {
    related: ["risesTo", "first passage"],
  }),
  term("first passage", "First period in which a state reaches a value.", {
    otherNames: ["first-passage time", "time to reach", "timeToReach"],
    unit: "unit of the period",
    related: ["risesTo", "fallsTo", "probability of an event"],
  }),
  term("forecast", "Future values from a fitted rule, with their uncertainty.", {
    mistakenFor: { simulation: "a simulation runs from given parameters" },
    related: ["future observation", "mean path", "prediction horizon"],
  }),
  term(
    "future observation",
    "A single later reading: uncertain by parameters, process error and observation error.",
    {
      mistakenFor: { "mean path": "the mean path has no observation error, so its band is narrower" },
      related: ["mean path", "prediction band"],
    },
  ),
  term("margin", "Half the width of an interval, or the distance to a limit.", {
    related: ["confidence interval"],
  }),
  term("mean path", "Expected values of a forecast, uncertain by parameters only.", {
    mistakenFor: { "future observation": "single readings scatter around it" },
    related: ["future observation"],
  }),
  term("Monte Carlo error", "Random error of a result from a finite number of simulated paths.", {
    otherNames: ["Monte-Carlo error"],
    formula: "sd/sqrt(paths)",
    mistakenFor: { "standard error": "it shrinks with more paths, not with more data" },
    related: ["paths", "seed"],
  }),
  term("next reading", "The future observation that would be most informative.", {
    otherNames: ["nextReading"],
    related: ["undecided", "not determined"],
  }),
  term(
    "optimize",
    "Finds the setting with the largest or smallest value of a measure (`maximize`, `minimize`).",
    {
      otherNames: ["maximize", "minimize", "optimization"],
      related: ["vary", "tradeoff"],
    },
  ),
  term("paths", "Number of simulated trajectories.", { related: ["Monte Carlo error", "seed"] }),
  term("periods", "Number of periods ahead.", { related: ["period"] }),
  term(
    "plan",
    "Future values of an input, by period: a usual value, changes from a period on, single periods.",
    {
      otherNames: ["input plan"],
      related: ["input", "scenario", "byGroup"],
    },
  ),
  term("prediction band", "Range that contains a given share of future values at each period.", {
    otherNames: ["band"],
    mistakenFor: { "confidence interval": "an interval is for a parameter" },
    related: ["future observation", "confidence level"],
  }),
  term(
    "prediction horizon",
    "Number of periods for which single trajectories of a chaotic rule can be predicted.",
    {
      otherNames: ["predictionHorizon", "horizon of predictability"],
      unit: "periods",
      related: ["Lyapunov exponent", "chaos"],
    },
  ),
  term(
    "probability of an event",
    "Share of simulated paths in which a state reaches a value (`probability`).",
    {
      otherNames: ["probability", "risk"],
      related: ["first passage", "paths"],
    },
  ),
  term("quantile", "Value below which a given share of values lies.", {
    formula: "definition 7 of Hyndman and Fan (1996)",
    related: ["prediction band", "median"],
  }),
  term("median", "The 50% quantile.", { related: ["quantile"] }),
  term("range", "Limits within which a setting is varied: `range: [low, high]`.", {
    related: ["vary", "values"],
  }),
  term("risesTo", "Option for a state that rises to a value: `risesTo: 120`.", {
    related: ["fallsTo", "first passage"],
  }),
  term(
    "scenario",
    "One set of future inputs. Scenarios use the same random numbers, so that they can be compared.",
    {
      otherNames: ["scenarios"],
      related: ["plan"],
    },
  ),
  term("seed", "Number that starts the random numbers; the same seed gives the same digits.", {
    related: ["paths", "Monte Carlo error"],
  }),
  term("sensitivity", "Change of an answer for a small change of one parameter or setting.", {
    related: ["elasticity"],
  }),
  term("simulation", "Values of a rule from given parameters, with process noise if given.", {
    related: ["forecast", "paths"],
  }),
  term("tradeoff", "Table of several measures over the values of one setting.", {
    related: ["optimize", "vary"],
  }),
  term("values", "Values to try: `values: [...]` or `{ from, to, count }`.", { related: ["vary", "range"] }),
  term("vary", "Parameters or inputs that a decision may change, each with a range or values.", {
    related: ["range", "values"],
  }),
];
