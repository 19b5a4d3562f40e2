import { type Term, termsOf } from "./term.js";

const term = termsOf("cultures");

/** Terms of cell cultures and microbiology. Common practice, no source. */
export const cultureTerms: readonly Term[] = [
  term(
    "biological replicate",
    "A separate culture grown under the same conditions. Only biological replicates show how much cultures differ.",
    {
      mistakenFor: {
        "technical replicate": "a second reading of one culture says nothing about other cultures",
      },
      related: ["technical replicate"],
    },
  ),
  term("blank", "A reading of the medium without cells, which is subtracted from every reading.", {
    formula: "net reading = reading - blank",
    unit: "the unit of the reading",
    mistakenFor: { "negative control": "a control is a sample in its own right; a blank is only subtracted" },
    related: ["optical density"],
  }),
  term(
    "carrying capacity",
    "The density at which growth stops because a resource is used up: the stable equilibrium K of the logistic and similar rules.",
    {
      otherNames: ["capacity"],
      unit: "cells/mL, or the unit of the state",
      mistakenFor: { "stationary phase": "a batch culture stays near its plateau only for a time" },
      related: ["equilibrium", "stationary phase"],
    },
  ),
  term("cfu", "Colony-forming unit: a cell or clump of cells that grows to one visible colony on a plate.", {
    otherNames: ["colony-forming unit"],
    formula: "cfu/mL = colonies*dilution/volume plated",
    unit: "cfu/mL",
    mistakenFor: { "cell count": "clumps count once, and cells that do not grow are not counted" },
    related: ["log reduction", "Poisson distribution"],
  }),
  term(
    "chemostat",
    "A culture with a constant inflow of medium and an equal outflow. At equilibrium it grows at the dilution rate.",
    { related: ["dilution rate", "washout"] },
  ),
  term("D-value", "Time needed to kill 90% of the cells: one log reduction.", {
    otherNames: ["decimal reduction time"],
    formula: "D = ln(10)/k for a death rate k",
    unit: "minutes",
    mistakenFor: { "half-life": "a half-life is the time to kill 50%, and is 0.301 D" },
    related: ["log reduction"],
  }),
  term("dilution rate", "Inflow of a chemostat per volume of culture.", {
    formula: "D = inflow/volume",
    unit: "1/hour",
    mistakenFor: { "dilution factor": "a factor is a ratio of volumes at one transfer, not a rate" },
    related: ["chemostat", "washout"],
  }),
  term("doubling time", "Time in which the density doubles during exponential growth.", {
    otherNames: ["generation time"],
    formula: "ln(2)/mu",
    unit: "hours",
    mistakenFor: {
      "specific growth rate": "a time, not a rate: faster growth means a shorter doubling time",
    },
    related: ["specific growth rate", "doublings per hour"],
  }),
  term("doublings per hour", "Number of doublings of the density per hour.", {
    formula: "mu/ln(2)",
    unit: "1/hour",
    mistakenFor: { "specific growth rate": "1.44 times larger than mu: one doubling is ln(2) = 0.693 of mu" },
    related: ["specific growth rate", "doubling time"],
  }),
  term("inoculum", "The cells with which a culture is started; its density is the initial state.", {
    unit: "cells/mL",
    related: ["initial state", "lag"],
  }),
  term("lag", "Time after a transfer in which cells adapt and the density hardly rises.", {
    otherNames: ["lag time"],
    unit: "hours",
    mistakenFor: {
      "lag of a rule": "in a rule, a lag is the number of periods back at which a value is read",
    },
    related: ["specific growth rate", "stationary phase"],
  }),
  term("log reduction", "Decrease of a count on the base-10 log scale: 3 log reductions leave 1 in 1000.", {
    formula: "log10(N0/N)",
    unit: "dimensionless",
    mistakenFor: { "percentage reduction": "3 log reductions are 99.9%, not 300%" },
    related: ["D-value", "cfu"],
  }),
  term("multiplier per period", "Factor from one value to the next, one period later.", {
    otherNames: ["growth factor"],
    formula: "R = exp(mu*h) for a period of length h",
    unit: "dimensionless",
    mistakenFor: { "specific growth rate": "a factor, not a rate: mu = ln(R)/h" },
    related: ["specific growth rate", "multiplier"],
  }),
  term(
    "optical density",
    "Light that a culture absorbs and scatters; proportional to the density while it is low.",
    {
      otherNames: ["OD", "absorbance"],
      formula: "OD = log10(light in/light out)",
      unit: "dimensionless",
      mistakenFor: {
        "cell count": "above about 0.4 it rises more slowly than the density (common practice)",
      },
      related: ["blank"],
    },
  ),
  term(
    "selection coefficient",
    "Difference of the growth rates of two competing types, from the change of the log ratio of their counts.",
    {
      formula: "s = change of ln(A/B) per generation or per hour",
      unit: "1/generation or 1/hour",
      mistakenFor: {
        "relative fitness": "fitness is a ratio of growth rates; s is a difference. State per which time",
      },
      related: ["specific growth rate"],
    },
  ),
  term(
    "specific growth rate",
    "Growth of the logarithm of the density per unit of time. With mu = 0.7 per hour a culture grows by the factor exp(0.7) = 2.01 per hour.",
    {
      otherNames: ["mu"],
      formula: "mu = d ln(N)/dt",
      unit: "1/hour",
      mistakenFor: {
        "doublings per hour": "doublings are mu/ln(2)",
        "multiplier per period": "the multiplier is exp(mu*h) for a period of length h",
      },
      related: ["doubling time", "lag", "carrying capacity"],
    },
  ),
  term("stationary phase", "Time after growth has ended, in which the density stays about constant.", {
    mistakenFor: { equilibrium: "a batch culture has used up its resource and declines later" },
    related: ["carrying capacity"],
  }),
  term(
    "technical replicate",
    "A repeated reading of one culture. It measures the instrument, not the biology.",
    {
      mistakenFor: { "biological replicate": "counting readings as cultures makes intervals far too narrow" },
      related: ["biological replicate"],
    },
  ),
  term("washout", "Loss of a culture because it is diluted faster than it grows.", {
    formula: "dilution rate > maximum specific growth rate",
    related: ["chemostat", "dilution rate"],
  }),
];
