import type { InputPlan } from "../../dynamics/index.js";
import { problemOf } from "../../estimate/index.js";
import type { Ground } from "../../projection/index.js";
import { type Standing, stateOf } from "./standing.js";

/** Something that can be set: a parameter, a first value "N[0]", or the usual level of an input. */
export interface Setting {
  readonly name: string;
  readonly role: "parameter" | "initial" | "input";
  /** Its place among parameters or in the state vector; -1 for an input. */
  readonly slot: number;
  /** What it is now; undefined for an input without a plan of one level. */
  readonly now: number | undefined;
  readonly bounds: readonly [number, number];
  /** The ground with the setting at a value. */
  readonly at: (value: number, ground?: Ground) => Ground;
}

const open: readonly [number, number] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];

/** Finds what a name sets. */
export function settingOf(standing: Standing, name: string): Setting {
  const { rule, ground } = standing;
  const parameter = rule.parameters.indexOf(name);
  const bounds = standing.fit ? problemOf(standing.fit).bounds(name) : (rule.bounds[name] ?? open);
  if (parameter >= 0)
    return {
      name,
      role: "parameter",
      slot: parameter,
      bounds,
      now: ground.parameters[parameter]!,
      at: (value, base = ground) => ({ ...base, parameters: replaced(base.parameters, parameter, value) }),
    };
  const state = rule.states.indexOf(stateOf(name));
  if (state >= 0)
    return {
      name,
      role: "initial",
      slot: state,
      bounds: rule.bounds[rule.states[state]!] ?? open,
      now: ground.initial[state]!,
      at: (value, base = ground) => ({ ...base, initial: replaced(base.initial, state, value) }),
    };
  return inputSetting(standing, name);
}

function inputSetting(standing: Standing, name: string): Setting {
  const plan = standing.plans[name];
  const usual =
    typeof plan === "number" ? plan : plan !== undefined && "usual" in plan ? plan.usual : undefined;
  return {
    name,
    role: "input",
    slot: -1,
    bounds: open,
    now: usual,
    at: (value, base = standing.ground) => {
      const { inputs } = standing.planned({ ...standing.plans, [name]: levelled(plan, value) });
      return { ...base, inputs };
    },
  };
}

/** A plan at another usual level; its steps and events stay. */
function levelled(plan: InputPlan | undefined, value: number): InputPlan {
  return typeof plan === "object" && "usual" in plan ? { ...plan, usual: value } : value;
}

function replaced(values: Float64Array, place: number, value: number): Float64Array {
  const copy = values.slice();
  copy[place] = value;
  return copy;
}
