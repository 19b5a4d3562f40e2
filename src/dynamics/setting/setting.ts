import type { Rule } from "../../rule/index.js";
import { beyondBounds, missingValue, notFinite, strangeName, wrongHistory } from "../refusals.js";

/** By state: its first value, or its first values oldest first where the rule reads past ones. */
export type InitialValues = Readonly<Record<string, number | readonly number[]>>;

const has = (given: object, name: string): boolean => Object.hasOwn(given, name);

/** Values by slot, from those given by name; each must be there, known and finite. */
function bySlot(
  role: string,
  names: readonly string[],
  given: Readonly<Record<string, number>>,
): Float64Array {
  for (const name of Object.keys(given)) if (!names.includes(name)) throw strangeName(role, name, names);
  return Float64Array.from(names, (name) => {
    if (!has(given, name)) throw missingValue(role, name, Object.keys(given));
    const value = given[name];
    if (typeof value !== "number" || !Number.isFinite(value)) throw notFinite(role, name, value);
    return value;
  });
}

/** Parameters by slot: those the rule holds fixed, and those given, which prevail. */
export const parametersBySlot = (rule: Rule, given: Readonly<Record<string, number>> = {}): Float64Array =>
  bySlot("parameter", rule.parameters, { ...rule.fixed, ...given });

/** Inputs by slot, each held at one value. */
export const heldInputs = (rule: Rule, given: Readonly<Record<string, number>> = {}): Float64Array =>
  bySlot("input", rule.inputs, given);

function firstValues(rule: Rule, state: string, given: InitialValues): readonly number[] {
  const lags = rule.lags.filter((kept) => kept.state === state).length;
  const value = given[state]!;
  const values = typeof value === "number" ? [value] : value;
  if (values.length !== lags + 1) throw wrongHistory(state, lags + 1, values.length);
  const [low, high] = rule.bounds[state] ?? [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
  for (const one of values) {
    if (!Number.isFinite(one)) throw notFinite("initial value of", state, one);
    if (one < low || one > high) throw beyondBounds(state, one, low, high);
  }
  return values;
}

/** The state vector at the start: present values, then the kept past ones. */
export function initialVector(rule: Rule, given: InitialValues = {}): Float64Array {
  const stated = Object.entries(rule.initial).filter(([, value]) => value !== "estimated");
  const all = { ...(Object.fromEntries(stated) as InitialValues), ...given };
  for (const name of Object.keys(all)) {
    if (!rule.states.includes(name)) throw strangeName("state", name, rule.states);
  }
  for (const state of rule.states) {
    if (!has(all, state)) throw missingValue("first value of", state, Object.keys(all));
  }
  const past = (state: string, lag: number): number => firstValues(rule, state, all).at(-1 - lag)!;
  return Float64Array.from([
    ...rule.states.map((state) => past(state, 0)),
    ...rule.lags.map(({ state, lag }) => past(state, lag)),
  ]);
}
