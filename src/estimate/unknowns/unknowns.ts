import type { Rule } from "../../rule/index.js";
import { checkNames } from "../options/check-names.js";
import type { FitOptions } from "../options/fit-options.js";
import { type Slot, slotsOf } from "./slots.js";

/** What an unknown stands for. */
export type UnknownRole = "parameter" | "initial" | "factor" | "scale";

/** What a fit is to find: free parameters, initial states that are not known, factors of the record, spreads. */
export interface Unknowns {
  readonly names: readonly string[];
  readonly roles: readonly UnknownRole[];
  /** [unknowns]: constant number, then parameters + slot of the state vector, then further + state of a factor, then spreads. */
  readonly columns: Int32Array;
  /** [parameters of the rule], fixed values in place. */
  readonly parameters: Float64Array;
  /** [slots of the rule's state vector], known values in place. */
  readonly initial: Float64Array;
  /** [states]: recorded = factor * state; 1 where there is none. */
  readonly factors: Float64Array;
  /** Variances, or a dispersion; their roots are reported where `rooted` says so. */
  readonly spreads: Float64Array;
  readonly rooted: readonly boolean[];
  readonly lower: Float64Array;
  readonly upper: Float64Array;
}

interface Unknown {
  readonly name: string;
  readonly role: UnknownRole;
  readonly column: number;
}

/** Sorts parameters and initial states into those to be found and those given. */
export function unknownsOf(rule: Rule, options: FitOptions, spreads: readonly string[] = []): Unknowns {
  const fixed = { ...rule.fixed, ...options.fixed };
  const bounds = { ...rule.bounds, ...options.bounds };
  const slots = slotsOf(rule);
  checkNames(rule, options, slots);
  const known = slots.map((slot) => knownInitial(rule, options, slot));
  const afterParameters = rule.parameters.length;
  const afterSlots = afterParameters + slots.length;
  const afterFactors = afterSlots + rule.states.length;
  const all: Unknown[] = [
    ...rule.parameters
      .map((name, column): Unknown => ({ name, role: "parameter", column }))
      .filter(({ name }) => fixed[name] === undefined),
    ...(options.errors === "observation" ? slots : [])
      .map(({ name }, s): Unknown => ({ name, role: "initial", column: afterParameters + s }))
      .filter((_, s) => known[s] === undefined),
    ...Object.entries(options.factor ?? {}).map(
      ([state, name]): Unknown => ({
        name,
        role: "factor",
        column: afterSlots + rule.states.indexOf(state),
      }),
    ),
    ...spreads.map((name, k): Unknown => ({ name, role: "scale", column: afterFactors + k })),
  ];
  const limits = all.map(
    ({ name, role }) => bounds[name] ?? (role === "factor" || role === "scale" ? positive : open),
  );
  return {
    names: all.map(({ name }) => name),
    roles: all.map(({ role }) => role),
    columns: Int32Array.from(all, ({ column }) => column),
    parameters: Float64Array.from(rule.parameters, (name) => fixed[name] ?? Number.NaN),
    initial: Float64Array.from(known, (value) => value ?? Number.NaN),
    factors: new Float64Array(rule.states.length).fill(1),
    spreads: new Float64Array(spreads.length),
    // A dispersion is a ratio of its own; the others are variances, which reach 0 with a slope where roots do not.
    rooted: all.map(({ name, role }) => role === "scale" && name !== "dispersion"),
    lower: Float64Array.from(limits, ([low]) => low),
    upper: Float64Array.from(limits, ([, high]) => high),
  };
}

const positive: readonly [number, number] = [0, Number.POSITIVE_INFINITY];
const open: readonly [number, number] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];

/** The given value of a slot at the first period, oldest first where there are several; undefined = to be found. */
function knownInitial(rule: Rule, options: FitOptions, slot: Slot): number | undefined {
  const stated = options.initial?.[slot.state] ?? rule.initial[slot.state];
  if (stated === undefined || stated === "estimated") return undefined;
  return typeof stated === "number" ? (slot.lag === 0 ? stated : undefined) : stated.at(-1 - slot.lag);
}

/** Writes values of the unknowns into the rule's parameters, initial states, factors and spreads. */
export function place(unknowns: Unknowns, values: Float64Array): void {
  const { columns, parameters, initial, factors, spreads } = unknowns;
  const afterSlots = parameters.length + initial.length;
  const afterFactors = afterSlots + factors.length;
  for (let i = 0; i < columns.length; i++) {
    const column = columns[i]!;
    if (column < parameters.length) parameters[column] = values[i]!;
    else if (column < afterSlots) initial[column - parameters.length] = values[i]!;
    else if (column < afterFactors) factors[column - afterSlots] = values[i]!;
    else spreads[column - afterFactors] = values[i]!;
  }
}
