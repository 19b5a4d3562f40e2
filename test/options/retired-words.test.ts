// One idea, one word: the words that were given up are nowhere in the public types in the meaning that was given up.
import { expect, test } from "vitest";
import { publicFunctions } from "./described-fields.js";
import { publicNames } from "./public-names.js";

/** By word: what it once named, and the word for it now. */
const retired: Readonly<Record<string, string>> = {
  constant: "a parameter",
  constants: "parameters",
  unknown: "vary, or parameter",
  unknowns: "parameters",
  spread: "distribution, or sd",
  proportional: 'distribution: "lognormal"',
  alpha: "level",
  draws: "paths, or resamples",
  lots: "paths",
  refits: "resamples",
  setting: "vary",
  between: "range",
  within: "range",
  when: "values",
  columns: "values",
  points: "values",
  starts: "initial, or start",
  guesses: "start",
  horizon: "periods",
  direction: "risesTo, or fallsTo",
  value: "risesTo, or fallsTo",
  risk: "probability",
  path: "trajectory",
  exactPath: "exactTrajectory",
  reaches: "timeToReach",
  best: "optimize",
  most: "maximize",
  least: "minimize",
  exponent: "lyapunovExponent",
  extend: "updateFit",
  regroup: "toPeriods",
  blame: "errors",
  leap: "step",
};

/** Where a word stands in another meaning, which is its own. */
const inAnotherMeaning: Readonly<Record<string, string>> = {
  points: "the view of a fit by its observed values",
  "GroupFit.points": "the same",
  "FitFrames.points": "the same as a frame",
  "Cycle.points": "values of a cycle",
  "Bifurcation.points": "the same",
  "Equilibria.points": "equilibria found",
  "Table.columns": "columns of a table",
  "TableOptions.columns": "the same",
  "ColumnTable.columns": "columns of a record",
  "RecordSource.path": "path of a file",
  "NamedEquilibrium.when": "condition under which a formula holds",
  "NamedClosedForm.when": "the same",
  "Optimum.flatness.within": "share of the optimum that is lost",
  "MatrixGrowth.firstPeriod.most": "bounds of growth in one period",
  "MatrixGrowth.firstPeriod.least": "the same",
  "ObservationOptions.value": "column of values",
  "Finding.value": "value that was found",
  "Estimate.value": "estimate of a parameter",
  "EstimateRow.value": "the same",
  "Estimate.trace.value": "value at which a parameter is held",
  "Window.estimates.value": "estimate in a part of the record",
  "Attractor.estimate.value": "the same",
  "LyapunovExponent.value": "value of the exponent",
  "Solution.value": "value of what is varied",
  "Tried.value": "the same",
  "TradeoffRow.value": "the same",
  "Optimum.value": "the same",
  "Optimum.curve.value": "the same",
  "SensitivityRow.value": "value of a parameter",
  "GroupReach.tendsTo.value": "level that a path tends to",
  "ArrowLayer.direction": "where an arrow points",
  "BoundsPassed.value": "value outside a bound",
};

test("no retired word is an exported, option or property name", () => {
  const names = [...publicNames(publicFunctions())];
  expect(names.length).toBeGreaterThan(900);
  const found = names.filter((name) => Object.hasOwn(retired, name.split(".").at(-1)!));
  expect(found.filter((name) => !Object.hasOwn(inAnotherMeaning, name))).toEqual([]);
  // A name that is gone needs no reason any more.
  expect(Object.keys(inAnotherMeaning).filter((name) => !found.includes(name))).toEqual([]);
});
