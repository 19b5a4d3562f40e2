import type { LeafRole } from "../graph/node.js";
import type { RuleGraph } from "../graph/rule-graph.js";
import { emitProgram } from "./emit-program.js";
import { lines, readArguments } from "./source-parts.js";

const sharedByPaths: ReadonlySet<LeafRole> = new Set(["constant", "input", "period"]);
const ofTheirOwn: ReadonlySet<LeafRole> = new Set(["input", "period"]);

/** Body of `advance(present, first, last, constants, inputs, t, limits)`: whatever paths share stands before the loop. */
export function advanceSource(rule: RuleGraph, shared: boolean): string {
  const program = emitProgram(rule.next, shared ? sharedByPaths : ofTheirOwn);
  const { states, constants, observed } = rule;
  const own = lines(constants, (i) => `const c${i} = constants[path * ${constants} + ${i}];`);
  const within = Array.from({ length: observed }, (_, i) => `n${i} >= low${i} && n${i} <= high${i}`).join(
    " && ",
  );
  return [
    lines(observed, (i) => `const low${i} = limits[${2 * i}];\nconst high${i} = limits[${2 * i + 1}];`),
    shared ? readArguments(rule) : readArguments({ ...rule, constants: 0 }),
    ...program.before,
    `for (let path = first, at = first * ${states}; path < last; path++, at += ${states}) {`,
    shared ? "" : own,
    lines(states, (i) => `const s${i} = present[at + ${i}];`),
    ...program.inside,
    lines(states, (i) => `const n${i} = ${program.read(rule.next[i]!)};`),
    lines(states, (i) => `present[at + ${i}] = n${i};`),
    `if (!(${within})) for (let i = 0; i < ${states}; i++) present[at + i] = NaN;`,
    "}",
  ].join("\n");
}
