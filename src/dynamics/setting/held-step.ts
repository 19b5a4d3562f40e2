import { compileRule, dependsOnPeriod, inputOffsets, type Rule } from "../../rule/index.js";
import { changesWithTime } from "../refusals.js";
import { heldInputs, parametersBySlot } from "./setting.js";

/** Parameters, and inputs held at one value, for questions about the long run. */
export interface HeldSetting {
  /**
   * Parameters by name; those that the rule holds fixed may be left out, and those of a fit are its
   * estimates.
   */
  readonly parameters?: Readonly<Record<string, number>>;
  /** By input: the value at which it stays. */
  readonly inputs?: Readonly<Record<string, number>>;
}

/** A rule that does the same in every period: its parameters and inputs are held. */
export interface HeldStep {
  readonly rule: Rule;
  readonly parameters: Float64Array;
  readonly inputs: Float64Array;
  /** Length of the state vector, kept past values included. */
  readonly width: number;
  readonly step: (state: Float64Array, next: Float64Array) => void;
  /**
   * Several steps, at most 64, in one go: the state vector moves on in place, and what comes back is how it there depends on the
   * vector it came from, [width, width]; it holds until the next call.
   */
  readonly leap: (state: Float64Array, periods: number) => Float64Array;
  /** Next state vector and its slopes [width, width] by the present one. */
  readonly slopes: (state: Float64Array) => { readonly next: Float64Array; readonly matrix: Float64Array };
}

/** Periods that a leap may take. */
const longestLeap = 64;

/** Holds a rule's parameters and inputs, or says why it cannot be held. */
export function holdStep(rule: Rule, setting: HeldSetting, what: string): HeldStep {
  if (dependsOnPeriod(rule)) throw changesWithTime(what);
  const parameters = parametersBySlot(rule, setting.parameters);
  const inputs = heldInputs(rule, setting.inputs);
  const compiled = compileRule(rule);
  const width = rule.states.length + rule.lags.length;
  // Columns long enough for every period that a leap reads, with its first step in their middle.
  const reach = Math.max(0, ...inputOffsets(rule).flatMap(([earliest, latest]) => [-earliest, latest]));
  const columns = Array.from(inputs, (value) => new Float64Array(2 * reach + longestLeap).fill(value));
  const unknowns = parameters.length + width;
  const values = new Float64Array(2 * width);
  const table = new Float64Array(2 * width * unknowns);
  const leapt = new Float64Array(width * width);
  let [longValues, longTable] = [values, table];
  /** Slopes of row `row` of a table of sensitivities by the first state vector. */
  const copySlopes = (from: Float64Array, row: number, to: Float64Array): void => {
    for (let i = 0; i < width; i++) {
      const begin = (row * width + i) * unknowns + parameters.length;
      for (let j = 0; j < width; j++) to[i * width + j] = from[begin + j]!;
    }
  };
  return {
    rule,
    parameters,
    inputs,
    width,
    step: (state, next) => compiled.step(state, parameters, columns, reach, next),
    slopes: (state) => {
      compiled.pathWithSensitivities(state, parameters, columns, reach, 1, values, table);
      const matrix = new Float64Array(width * width);
      copySlopes(table, 1, matrix);
      return { next: values.slice(width), matrix };
    },
    leap: (state, periods) => {
      if (longValues.length < (periods + 1) * width) {
        longValues = new Float64Array((periods + 1) * width);
        longTable = new Float64Array((periods + 1) * width * unknowns);
      }
      compiled.pathWithSensitivities(state, parameters, columns, reach, periods, longValues, longTable);
      for (let i = 0; i < width; i++) state[i] = longValues[periods * width + i]!;
      copySlopes(longTable, periods, leapt);
      return leapt;
    },
  };
}

/** The state vector in which past values are the same as the present ones. */
export function settled(rule: Rule, present: ArrayLike<number>): Float64Array {
  return Float64Array.from([
    ...rule.states.map((_, slot) => present[slot]!),
    ...rule.lags.map(({ state }) => present[rule.states.indexOf(state)]!),
  ]);
}
