import type { RuleGraph } from "../graph/rule-graph.js";
import { type SensitivityCell, sensitivityParts } from "./sensitivity-parts.js";
import { lines, readArguments } from "./source-parts.js";

/**
 * Body of `pathWithSensitivities(initial, parameters, inputs, from, periods, values, sensitivities)`: one pass,
 * all in local variables.
 */
export function sensitivitySource(rule: RuleGraph): string {
  const { program, cells, declared, next, moved } = sensitivityParts(rule);
  const writeCell = ({ slot, unknown, at, live }: SensitivityCell): string =>
    `sensitivities[q + ${at}] = ${live ? `d${slot}_${unknown}` : "0"};`;
  return [
    readArguments(rule),
    lines(rule.states, (i) => `let s${i} = initial[${i}];\nvalues[${i}] = s${i};`),
    ...declared,
    "let q = 0;",
    ...cells.map(writeCell),
    ...program.preamble,
    `for (let i = 1, at = ${rule.states}, t = from; i <= periods; i++, t++, at += ${rule.states}) {`,
    ...program.body,
    lines(rule.states, (i) => `const n${i} = ${program.read(rule.next[i]!)};`),
    ...next,
    lines(rule.states, (i) => `s${i} = n${i};\nvalues[at + ${i}] = n${i};`),
    ...moved,
    `q += ${cells.length};`,
    ...cells.map(writeCell),
    "}",
  ].join("\n");
}
