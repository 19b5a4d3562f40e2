import type { RuleGraph } from "../graph/rule-graph.js";
import { emitProgram } from "./emit-program.js";
import { lines, readArguments } from "./source-parts.js";

/** Body of `step(state, parameters, inputs, t, next)`. */
export function stepSource(rule: RuleGraph): string {
  const program = emitProgram(rule.next);
  return [
    readArguments(rule),
    lines(rule.states, (i) => `const s${i} = state[${i}];`),
    ...program.preamble,
    ...program.body,
    // All are worked out before any is written: `next` may be the same array as `state`.
    lines(rule.states, (i) => `const n${i} = ${program.read(rule.next[i]!)};`),
    lines(rule.states, (i) => `next[${i}] = n${i};`),
  ].join("\n");
}

/** Body of `path(initial, parameters, inputs, from, periods, values)`. */
export function pathSource(rule: RuleGraph): string {
  const program = emitProgram(rule.next);
  return [
    readArguments(rule),
    lines(rule.states, (i) => `let s${i} = initial[${i}];\nvalues[${i}] = s${i};`),
    ...program.preamble,
    `for (let i = 1, at = ${rule.states}, t = from; i <= periods; i++, t++, at += ${rule.states}) {`,
    ...program.body,
    lines(rule.states, (i) => `const n${i} = ${program.read(rule.next[i]!)};`),
    lines(rule.states, (i) => `s${i} = n${i};\nvalues[at + ${i}] = n${i};`),
    "}",
  ].join("\n");
}
