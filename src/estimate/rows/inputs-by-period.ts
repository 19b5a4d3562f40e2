import { inputByPeriod, type ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";

/** One column an input of the rule, indexed by period; NaN where the record has no row. */
export function inputsByPeriod(rule: Rule, group: ObservedGroup): readonly Float64Array[] {
  return rule.inputs.map((name) => inputByPeriod(group, name));
}
