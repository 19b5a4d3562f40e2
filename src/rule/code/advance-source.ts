import type { LeafRole } from "../graph/node.js";
import type { RuleGraph } from "../graph/rule-graph.js";
import { type EmittedProgram, emitProgram } from "./emit-program.js";
import { lines, readArguments } from "./source-parts.js";

const sharedByPaths: ReadonlySet<LeafRole> = new Set(["parameter", "input", "period"]);
const fixedPerPath: ReadonlySet<LeafRole> = new Set(["input", "period"]);

/** Paths stepped in one turn of the unrolled loop: their steps overlap in the processor, and one check serves all. */
const unrollFactor = 8;

/** Source that steps the path whose state vector starts at `place`. */
function stepLines(rule: RuleGraph, program: EmittedProgram, place: string): readonly string[] {
  return [
    lines(rule.states, (i) => `const s${i} = present[${place} + ${i}];`),
    ...program.body,
    lines(rule.states, (i) => `const n${i} = ${program.read(rule.next[i]!)};`),
    lines(rule.states, (i) => `present[${place} + ${i}] = n${i};`),
  ];
}

/**
 * Unrolled loop for a rule of one state without bounds. A finite sum shows that every path of the group is finite;
 * otherwise each is checked.
 */
function unrolledLoop(rule: RuleGraph, program: EmittedProgram): readonly string[] {
  const step = (k: number): readonly string[] => [
    "{",
    ...stepLines(rule, program, `path + ${k}`),
    `e${k} = n0;`,
    "}",
  ];
  const sum = Array.from({ length: unrollFactor / 2 }, (_, k) => `(e${2 * k} + e${2 * k + 1})`).join(" + ");
  return [
    "if (low0 === -Number.MAX_VALUE && high0 === Number.MAX_VALUE) {",
    lines(unrollFactor, (k) => `let e${k} = 0;`),
    `for (; path + ${unrollFactor} <= last; path += ${unrollFactor}) {`,
    ...Array.from({ length: unrollFactor }, (_, k) => step(k)).flat(),
    `const sum = ${sum};`,
    `if (sum - sum !== 0) for (let at = path; at < path + ${unrollFactor}; at++) {`,
    "if (!(present[at] >= low0 && present[at] <= high0)) present[at] = NaN;",
    "}",
    "}",
    "}",
  ];
}

/** Body of `advance(present, first, last, parameters, inputs, t, limits)`; what all paths share is computed before the loops. */
export function advanceSource(rule: RuleGraph, shared: boolean): string {
  const program = emitProgram(rule.next, shared ? sharedByPaths : fixedPerPath);
  const { states, parameters, observed } = rule;
  const own = lines(parameters, (i) => `const c${i} = parameters[path * ${parameters} + ${i}];`);
  const within = Array.from({ length: observed }, (_, i) => `n${i} >= low${i} && n${i} <= high${i}`).join(
    " && ",
  );
  return [
    lines(observed, (i) => `const low${i} = limits[${2 * i}];\nconst high${i} = limits[${2 * i + 1}];`),
    shared ? readArguments(rule) : readArguments({ ...rule, parameters: 0 }),
    ...program.preamble,
    "let path = first;",
    ...(shared && states === 1 ? unrolledLoop(rule, program) : []),
    `for (let at = path * ${states}; path < last; path++, at += ${states}) {`,
    shared ? "" : own,
    ...stepLines(rule, program, "at"),
    `if (!(${within})) for (let i = 0; i < ${states}; i++) present[at + i] = NaN;`,
    "}",
  ].join("\n");
}
