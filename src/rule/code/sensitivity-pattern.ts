import type { RuleGraph } from "../graph/rule-graph.js";
import { stepJacobian } from "../graph/step-jacobian.js";

/**
 * Which sensitivities can ever differ from zero, [slot][parameters then initial states]: a slot depends on an
 * unknown at once, or through a slot that it reads.
 */
export function sensitivityPattern(rule: RuleGraph): readonly (readonly boolean[])[] {
  const { byState, byParameter } = stepJacobian(rule);
  const zero = rule.graph.number(0);
  const pattern = rule.next.map((_, slot) => [
    ...byParameter[slot]!.map((node) => node !== zero),
    ...rule.next.map((_, initial) => initial === slot),
  ]);
  for (let changed = true; changed; ) {
    changed = false;
    pattern.forEach((row, slot) => {
      pattern.forEach((other, k) => {
        if (byState[slot]![k] === zero) return;
        other.forEach((reached, unknown) => {
          if (!reached || row[unknown]) return;
          row[unknown] = true;
          changed = true;
        });
      });
    });
  }
  return pattern;
}
