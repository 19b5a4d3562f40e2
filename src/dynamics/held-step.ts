import { compileRule, inputReach, type Rule, readsPeriod } from "../rule/index.js";
import { changesWithTime } from "./refusals.js";
import { constantsBySlot, heldInputs } from "./setting.js";

/** Constants, and inputs held at one value, for questions about the long run. */
export interface HeldSetting {
  readonly constants?: Readonly<Record<string, number>>;
  /** By input: the value at which it stays. */
  readonly inputs?: Readonly<Record<string, number>>;
}

/** A rule that does the same in every period: its constants and inputs are held. */
export interface HeldStep {
  readonly rule: Rule;
  readonly constants: Float64Array;
  readonly inputs: Float64Array;
  /** Length of the state vector, kept past values included. */
  readonly width: number;
  readonly step: (state: Float64Array, next: Float64Array) => void;
  /** Next state vector and its slopes [width, width] by the present one. */
  readonly slopes: (state: Float64Array) => { readonly next: Float64Array; readonly matrix: Float64Array };
}

/** Holds a rule's constants and inputs, or says why it cannot be held. */
export function holdStep(rule: Rule, setting: HeldSetting, what: string): HeldStep {
  if (readsPeriod(rule)) throw changesWithTime(what);
  const constants = constantsBySlot(rule, setting.constants);
  const inputs = heldInputs(rule, setting.inputs);
  const compiled = compileRule(rule);
  const width = rule.states.length + rule.memory.length;
  // Columns long enough for every period that one step reads, with the step at their middle.
  const reach = Math.max(0, ...inputReach(rule).flatMap(([earliest, latest]) => [-earliest, latest]));
  const columns = Array.from(inputs, (value) => new Float64Array(2 * reach + 1).fill(value));
  const unknowns = constants.length + width;
  const values = new Float64Array(2 * width);
  const table = new Float64Array(2 * width * unknowns);
  return {
    rule,
    constants,
    inputs,
    width,
    step: (state, next) => compiled.step(state, constants, columns, reach, next),
    slopes: (state) => {
      compiled.pathWithSensitivities(state, constants, columns, reach, 1, values, table);
      const matrix = new Float64Array(width * width);
      for (let i = 0; i < width; i++) {
        const row = width * unknowns + i * unknowns + constants.length;
        matrix.set(table.subarray(row, row + width), i * width);
      }
      return { next: values.slice(width), matrix };
    },
  };
}

/** The state vector in which past values are the same as the present ones. */
export function settled(rule: Rule, present: ArrayLike<number>): Float64Array {
  return Float64Array.from([
    ...rule.states.map((_, slot) => present[slot]!),
    ...rule.memory.map(({ state }) => present[rule.states.indexOf(state)]!),
  ]);
}
