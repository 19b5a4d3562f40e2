import type { Fit } from "../../src/estimate/index.js";
import type { Rule } from "../../src/rule/index.js";
import type { Size } from "./function-schema.js";

/** Bytes of a number. */
const size = 8;

const count = (value: unknown, byDefault: number): number => (typeof value === "number" ? value : byDefault);

const length = (value: unknown, byDefault: number): number =>
  Array.isArray(value)
    ? value.length
    : typeof value === "object" && value !== null
      ? Object.keys(value).length
      : byDefault;

const ruleOf = (subject: unknown): Rule => (subject as Partial<Fit>).rule ?? (subject as Rule);

const groupsOf = (subject: unknown): number => (subject as Partial<Fit>).groups?.length ?? 1;

/** Columns by period that a projection keeps for each state: path, median and two limits a level, twice over. */
const columns = (levels: number): number => 4 + 4 * levels;

/** What a forecast or a simulation keeps: its columns by period. */
export const projectedPeriods: Size = {
  option: "periods",
  bytes: (options, [subject]) => {
    const states = ruleOf(subject).states.length;
    const series = groupsOf(subject) * length(options["scenarios"], 1);
    return (
      size * count(options["periods"], 0) * series * (2 + states * columns(length(options["levels"], 3)))
    );
  },
};

/** What all paths need at one period: their parameters and states, twice over. */
export const projectedPaths: Size = {
  option: "paths",
  bytes: (options, [subject]) => {
    const rule = ruleOf(subject);
    return size * count(options["paths"], 0) * (rule.parameters.length + 4 * rule.states.length + 4);
  },
};

/** One path in every period, with its quantities. */
export const steppedPeriods: Size = {
  option: "periods",
  bytes: (options, [subject]) => {
    const rule = ruleOf(subject);
    return 3 * size * count(options["periods"], 0) * (rule.states.length + rule.quantities.length);
  },
};

/** Exact fractions grow with every period. */
export const exactPeriods: Size = {
  option: "periods",
  bytes: (options, [subject]) => 1000 * count(options["periods"], 0) * ruleOf(subject).states.length,
};

/** The estimates of every refit. */
export const keptResamples: Size = {
  option: "resamples",
  bytes: (options, [subject]) =>
    3 * size * count(options["resamples"], 0) * groupsOf(subject) * (ruleOf(subject).parameters.length + 2),
};
