import type { InputPlan } from "../../dynamics/index.js";
import { problemOf } from "../../estimate/index.js";
import type { Ground } from "../../projection/index.js";
import { type DecisionContext, stateOf } from "./decision-context.js";

/** Something that can be set: a parameter, a first value "N[0]", or the usual level of an input. */
export interface Setting {
  readonly name: string;
  readonly role: "parameter" | "initial" | "input";
  /** Its place among parameters or in the state vector; -1 for an input. */
  readonly slot: number;
  /** What it is now; undefined for an input without a plan of one level. */
  readonly now: number | undefined;
  readonly bounds: readonly [number, number];
}

/** A setting at a value. */
export interface Choice {
  readonly setting: Setting;
  readonly value: number;
  /**
   * Whether the record is run with it as well, because an error of an estimate would have been there all along. A
   * setting that is chosen holds from the record's end.
   */
  readonly throughout?: boolean;
}

const open: readonly [number, number] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];

/** Finds what a name sets. */
export function settingOf(context: DecisionContext, name: string): Setting {
  const { rule, ground, plans } = context;
  const parameter = rule.parameters.indexOf(name);
  const bounds = context.fit ? problemOf(context.fit).bounds(name) : (rule.bounds[name] ?? open);
  if (parameter >= 0)
    return { name, role: "parameter", slot: parameter, bounds, now: ground.parameters[parameter]! };
  const state = rule.states.indexOf(stateOf(name));
  if (state >= 0) {
    const within = rule.bounds[rule.states[state]!] ?? open;
    return { name, role: "initial", slot: state, bounds: within, now: ground.initial[state]! };
  }
  const plan = plans[name];
  const usual =
    typeof plan === "number" ? plan : plan !== undefined && "usual" in plan ? plan.usual : undefined;
  return { name, role: "input", slot: -1, bounds: open, now: usual };
}

/**
 * The ground with a setting at a value: a parameter or plan from the present on, a first value from the start, which
 * begins the path anew.
 */
export function groundAt(context: DecisionContext, choice: Choice | undefined): Ground {
  const { ground, plans } = context;
  if (choice === undefined) return ground;
  const { setting, value } = choice;
  const { role, slot, name } = setting;
  if (role === "input")
    return { ...ground, inputs: context.planned({ ...plans, [name]: levelled(plans[name], value) }).inputs };
  if (role === "initial")
    return { ...ground, initial: withValue(ground.initial, slot, ground.initial.length, value) };
  const parameters = withValue(ground.parameters, slot, ground.parameters.length, value);
  if (choice.throughout === true || ground.present === 0) return { ...ground, parameters };
  return { ...ground, ahead: { row: ground.present, parameters } };
}

/** A plan at another usual level; its steps and events stay. */
function levelled(plan: InputPlan | undefined, value: number): InputPlan {
  return typeof plan === "object" && "usual" in plan ? { ...plan, usual: value } : value;
}

/** Rows with the same place of each set. */
export function withValue(rows: Float64Array, place: number, width: number, value: number): Float64Array {
  const copy = rows.slice();
  for (let at = place; at < copy.length; at += width) copy[at] = value;
  return copy;
}
