import type { Rule } from "../rule/index.js";
import type { FitOptions } from "./fit-options.js";
import { refuseStartOutsideBounds, refuseUnknownName } from "./refusals.js";

/** What a fit is to find: the free constants of a rule, then the initial states that are not known. */
export interface Unknowns {
  readonly names: readonly string[];
  readonly roles: readonly ("constant" | "initial")[];
  /** [unknowns]: the column of each among a rule's sensitivities (constants first, then initial states). */
  readonly columns: Int32Array;
  /** [constants of the rule], fixed values in place. */
  readonly constants: Float64Array;
  /** [states of the rule], known values in place. */
  readonly initial: Float64Array;
  readonly lower: Float64Array;
  readonly upper: Float64Array;
}

/** Sorts constants and initial states into those to be found and those given. */
export function unknownsOf(rule: Rule, options: FitOptions): Unknowns {
  const fixed = { ...rule.fixed, ...options.fixed };
  const bounds = { ...rule.bounds, ...options.bounds };
  const initialNames = rule.states.map((state) => `${state}[0]`);
  refuseStrangers(rule, options, initialNames);
  const free = rule.constants.filter((name) => fixed[name] === undefined);
  const estimated =
    options.errors === "observation"
      ? rule.states.filter((state) => options.initial?.[state] === undefined)
      : [];
  const names = [...free, ...estimated.map((state) => `${state}[0]`)];
  const limits = names.map((name) => bounds[name] ?? [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY]);
  return {
    names,
    roles: names.map((_, i) => (i < free.length ? "constant" : "initial")),
    columns: Int32Array.from([
      ...free.map((name) => rule.constants.indexOf(name)),
      ...estimated.map((state) => rule.constants.length + rule.states.indexOf(state)),
    ]),
    constants: Float64Array.from(rule.constants, (name) => fixed[name] ?? Number.NaN),
    initial: Float64Array.from(rule.states, (state) => options.initial?.[state] ?? Number.NaN),
    lower: Float64Array.from(limits, ([low]) => low),
    upper: Float64Array.from(limits, ([, high]) => high),
  };
}

/** Writes values of the unknowns into the rule's constants and initial states. */
export function place(unknowns: Unknowns, values: Float64Array): void {
  const { columns, constants, initial } = unknowns;
  for (let i = 0; i < columns.length; i++) {
    const column = columns[i]!;
    if (column < constants.length) constants[column] = values[i]!;
    else initial[column - constants.length] = values[i]!;
  }
}

function refuseStrangers(rule: Rule, options: FitOptions, initialNames: readonly string[]): void {
  refuseOthers(options.fixed, rule.constants, "constant");
  refuseOthers(options.start, rule.constants, "constant");
  refuseOthers(options.initial, rule.states, "state");
  refuseOthers(
    options.bounds,
    [...rule.constants, ...rule.states, ...initialNames],
    "constant or initial state",
  );
  for (const [name, value] of Object.entries(options.start ?? {})) {
    const limit = options.bounds?.[name] ?? rule.bounds[name];
    if (limit && (value < limit[0] || value > limit[1])) throw refuseStartOutsideBounds(name, value, limit);
  }
}

function refuseOthers(given: object | undefined, known: readonly string[], role: string): void {
  for (const name of Object.keys(given ?? {}))
    if (!known.includes(name)) throw refuseUnknownName(name, known, role);
}
