import type { LeafRole } from "../graph/node.js";
import type { RuleGraph } from "../graph/rule-graph.js";
import { type EmittedProgram, emitProgram } from "./emit-program.js";
import { lines, readArguments } from "./source-parts.js";

const sharedByPaths: ReadonlySet<LeafRole> = new Set(["parameter", "input", "period"]);
const fixedPerPath: ReadonlySet<LeafRole> = new Set(["input", "period"]);

/** Paths stepped in one turn of the unrolled loop: their steps overlap in the processor. */
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

/** Unrolled loop for a rule of one state. */
function unrolledLoop(rule: RuleGraph, program: EmittedProgram): readonly string[] {
  return [
    `for (; path + ${unrollFactor} <= last; path += ${unrollFactor}) {`,
    ...Array.from({ length: unrollFactor }, (_, k) => [
      "{",
      ...stepLines(rule, program, `path + ${k}`),
      "}",
    ]).flat(),
    "}",
  ];
}

/** Reads the parameters of one path where every path has its own. */
const ownParameters = (count: number): string =>
  lines(count, (i) => `const c${i} = parameters[path * ${count} + ${i}];`);

/** Body of `advance(present, first, last, parameters, inputs, t)`: whatever paths share stands before the loops. */
export function advanceSource(rule: RuleGraph, shared: boolean): string {
  const program = emitProgram(rule.next, shared ? sharedByPaths : fixedPerPath);
  const { states, parameters } = rule;
  return [
    shared ? readArguments(rule) : readArguments({ ...rule, parameters: 0 }),
    ...program.preamble,
    "let path = first;",
    ...(shared && states === 1 ? unrolledLoop(rule, program) : []),
    `for (let at = path * ${states}; path < last; path++, at += ${states}) {`,
    shared ? "" : ownParameters(parameters),
    ...stepLines(rule, program, "at"),
    "}",
  ].join("\n");
}

/** Body of `quantities(present, first, last, parameters, stride, inputs, t, out)`. */
export function quantitiesSource(rule: RuleGraph): string {
  const program = emitProgram(rule.quantities, fixedPerPath);
  const { states, parameters } = rule;
  return [
    readArguments({ ...rule, parameters: 0 }),
    ...program.preamble,
    `for (let path = first, at = first * ${states}; path < last; path++, at += ${states}) {`,
    lines(parameters, (i) => `const c${i} = parameters[path * stride + ${i}];`),
    lines(states, (i) => `const s${i} = present[at + ${i}];`),
    ...program.body,
    lines(rule.quantities.length, (i) => `out[${i}][path] = ${program.read(rule.quantities[i]!)};`),
    "}",
  ].join("\n");
}
