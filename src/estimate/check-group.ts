import type { ObservedGroup } from "../record/index.js";
import type { Rule } from "../rule/index.js";
import type { FitOptions } from "./fit-options.js";
import { refuseMissingInput, refuseNoChange, refuseNoLogarithm, refuseTooFew } from "./refusals.js";
import type { Unknowns } from "./unknowns.js";

/** Refuses a group from which no honest fit can come. */
export function checkGroup(rule: Rule, group: ObservedGroup, options: FitOptions, unknowns: Unknowns): void {
  for (const input of rule.inputs) if (!group.inputs[input]) throw refuseMissingInput(input, group);
  const rows = group.index.length;
  const usable = options.errors === "process" ? Math.max(0, rows - 1) : rows;
  const what = options.errors === "process" ? "pairs" : "values";
  if (usable < unknowns.names.length + 3) throw refuseTooFew(group, usable, unknowns.names, what);
  for (const state of rule.states) checkState(group, group.values[state]!, options);
}

function checkState(group: ObservedGroup, values: Float64Array, options: FitOptions): void {
  if (values.every((value) => value === values[0])) throw refuseNoChange(group, values[0]!);
  if (options.spread !== "proportional") return;
  const bad = values.findIndex((value) => value <= 0);
  if (bad >= 0) throw refuseNoLogarithm(group, group.rows[bad]!, values[bad]!);
}
