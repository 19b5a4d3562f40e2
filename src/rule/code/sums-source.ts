import type { RuleGraph } from "../graph/rule-graph.js";
import { type SensitivityParts, sensitivityParts } from "./sensitivity-parts.js";
import { lines, readArguments } from "./source-parts.js";

/**
 * Body of `pathSums(initial, parameters, inputs, from, periods, observed, weights, sums)`: the path, its
 * sensitivities and the sums of a least-squares fit in one pass. Only the sums leave the loop, so the processor can
 * add up one period while it computes the next.
 *
 * @param logarithmic - compares log x with what is observed, instead of x.
 */
export function sumsSource(rule: RuleGraph, logarithmic: boolean): string {
  const parts = sensitivityParts(rule);
  const { program, declared, next, moved } = parts;
  const unknowns = Array.from({ length: rule.parameters + rule.states }, (_, unknown) => unknown);
  const pairs = unknowns.flatMap((a) => unknowns.slice(a).map((b) => `g${a}_${b}`));
  const products = unknowns.map((a) => `h${a}`);
  const gather = rule.next.map((_, slot) => gatherSource(parts, slot, logarithmic));
  return [
    readArguments(rule),
    "let sum = 0;",
    ...[...pairs, ...products].map((name) => `let ${name} = 0;`),
    lines(rule.states, (i) => `let s${i} = initial[${i}];`),
    ...declared,
    "let at = 0;",
    ...gather,
    ...program.preamble,
    `for (let i = 1, t = from; i <= periods; i++, t++) {`,
    ...program.body,
    lines(rule.states, (i) => `const n${i} = ${program.read(rule.next[i]!)};`),
    ...next,
    lines(rule.states, (i) => `s${i} = n${i};`),
    ...moved,
    `at += ${rule.states};`,
    ...gather,
    "}",
    ...[...pairs, ...products].map((name, i) => `sums[${i}] = ${name};`),
    "return sum;",
  ].join("\n");
}

/** Adds one slot of the present period to the sums; a weight of 0 leaves it out. */
function gatherSource({ cells }: SensitivityParts, slot: number, logarithmic: boolean): string {
  const live = cells.filter((cell) => cell.slot === slot && cell.live).map(({ unknown }) => unknown);
  const value = logarithmic ? `Math.log(s${slot})` : `s${slot}`;
  const scaled = logarithmic ? ` / s${slot}` : "";
  const body = [
    `const r = w * (observed[at + ${slot}] - ${value});`,
    "sum += r * r;",
    logarithmic ? `const v = w${scaled};` : "const v = w;",
    ...live.map((a) => `const f${a} = v * d${slot}_${a};`),
    ...live.map((a) => `h${a} -= f${a} * r;`),
    ...live.flatMap((a, i) => live.slice(i).map((b) => `g${a}_${b} += f${a} * f${b};`)),
  ];
  return `{\nconst w = weights[at + ${slot}];\nif (w !== 0) {\n${body.join("\n")}\n}\n}`;
}
