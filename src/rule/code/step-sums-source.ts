import type { RuleGraph } from "../graph/rule-graph.js";
import { stepJacobian } from "../graph/step-jacobian.js";
import { type EmittedProgram, emitProgram } from "./emit-program.js";
import { lines, readArguments } from "./source-parts.js";

/**
 * Body of `stepSums(parameters, inputs, periods, from, observed, weights, sums)`: one step from every recorded state, and
 * the sums of a least-squares fit in the same pass.
 *
 * @param logarithmic - compares log x with what is observed, instead of x.
 */
export function stepSumsSource(rule: RuleGraph, logarithmic: boolean): string {
  const { byParameter } = stepJacobian(rule);
  const program = emitProgram([...rule.next, ...byParameter.flat()]);
  const unknowns = Array.from({ length: rule.parameters }, (_, unknown) => unknown);
  const pairs = unknowns.flatMap((a) => unknowns.slice(a).map((b) => `g${a}_${b}`));
  const sums = [...pairs, ...unknowns.map((a) => `h${a}`)];
  return [
    readArguments(rule),
    "let sum = 0;",
    ...sums.map((name) => `let ${name} = 0;`),
    ...program.preamble,
    `for (let i = 0, at = 0; i < periods.length; i++, at += ${rule.states}) {`,
    "const t = periods[i];",
    lines(rule.states, (k) => `const s${k} = from[at + ${k}];`),
    ...program.body,
    ...rule.next.map((_, slot) => gatherSource(rule, program, slot, logarithmic)),
    "}",
    ...sums.map((name, i) => `sums[${i}] = ${name};`),
    "return sum;",
  ].join("\n");
}

/** Adds one slot of the present pair to the sums; a weight of 0 leaves it out. */
function gatherSource(rule: RuleGraph, program: EmittedProgram, slot: number, logarithmic: boolean): string {
  const slopes = stepJacobian(rule).byParameter[slot]!.map((node, a) => ({
    a,
    source: program.read(node),
  }));
  const live = slopes.filter(({ source }) => source !== "0");
  const value = `x${slot}`;
  const body = [
    `const ${value} = ${program.read(rule.next[slot]!)};`,
    `const r = w * (observed[at + ${slot}] - ${logarithmic ? `Math.log(${value})` : value});`,
    "sum += r * r;",
    logarithmic ? `const v = w / ${value};` : "const v = w;",
    ...live.map(({ a, source }) => `const f${a} = v * ${source};`),
    ...live.map(({ a }) => `h${a} -= f${a} * r;`),
    ...live.flatMap(({ a }, i) => live.slice(i).map(({ a: b }) => `g${a}_${b} += f${a} * f${b};`)),
  ];
  return `{\nconst w = weights[at + ${slot}];\nif (w !== 0) {\n${body.join("\n")}\n}\n}`;
}
