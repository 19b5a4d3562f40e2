import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";

/** One column an input of the rule, indexed by period; NaN where the record has no row. */
export function inputsByPeriod(rule: Rule, group: ObservedGroup): readonly Float64Array[] {
  const periods = group.index[group.index.length - 1]! + 1;
  return rule.inputs.map((name) => {
    const column = new Float64Array(periods).fill(Number.NaN);
    const recorded = group.inputs[name];
    group.index.forEach((period, i) => {
      column[period] = recorded?.[i] ?? Number.NaN;
    });
    return column;
  });
}
