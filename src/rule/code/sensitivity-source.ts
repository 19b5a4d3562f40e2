import type { RuleGraph } from "../graph/rule-graph.js";
import { stepDerivatives } from "../graph/step-derivatives.js";
import { emitProgram } from "./emit-program.js";
import { sensitivityPattern } from "./sensitivity-pattern.js";
import { lines, readArguments } from "./source-parts.js";

/** The sum, as source, that makes the next sensitivity of a slot to unknown number `unknown`. */
function nextSensitivity(
  rule: RuleGraph,
  pattern: readonly (readonly boolean[])[],
  read: (node: RuleGraph["next"][number]) => string,
  slot: number,
  unknown: number,
): string {
  const { byState, byConstant } = stepDerivatives(rule);
  const terms: string[] = [];
  for (let k = 0; k < rule.states; k++) {
    const source = read(byState[slot]![k]!);
    if (source === "0" || !pattern[k]![unknown]) continue;
    terms.push(source === "1" ? `d${k}_${unknown}` : `${source} * d${k}_${unknown}`);
  }
  const own = unknown < rule.constants ? read(byConstant[slot]![unknown]!) : "0";
  if (own !== "0") terms.push(own);
  return terms.join(" + ");
}

/**
 * Body of `pathWithSensitivities(initial, constants, inputs, from, periods, values, sensitivities)`: one pass,
 * d x' / d p = sum over states (d f / d x)(d x / d p) + d f / d p, all in local variables.
 */
export function sensitivitySource(rule: RuleGraph): string {
  const { byState, byConstant } = stepDerivatives(rule);
  const program = emitProgram([...rule.next, ...byState.flat(), ...byConstant.flat()]);
  const pattern = sensitivityPattern(rule);
  const unknowns = rule.constants + rule.states;
  const cells = rule.next.flatMap((_, slot) =>
    Array.from({ length: unknowns }, (_, unknown) => ({ slot, unknown, at: slot * unknowns + unknown })),
  );
  const live = cells.filter(({ slot, unknown }) => pattern[slot]![unknown]);
  const isOwn = (slot: number, unknown: number): number => (unknown === rule.constants + slot ? 1 : 0);
  const writeCell = ({ slot, unknown, at }: (typeof cells)[number]): string =>
    `sensitivities[q + ${at}] = ${pattern[slot]![unknown] ? `d${slot}_${unknown}` : "0"};`;
  const next = ({ slot, unknown }: (typeof cells)[number]): string =>
    `const e${slot}_${unknown} = ${nextSensitivity(rule, pattern, program.read, slot, unknown)};`;
  return [
    readArguments(rule),
    lines(rule.states, (i) => `let s${i} = initial[${i}];\nvalues[${i}] = s${i};`),
    ...live.map(({ slot, unknown }) => `let d${slot}_${unknown} = ${isOwn(slot, unknown)};`),
    "let q = 0;",
    ...cells.map(writeCell),
    ...program.before,
    `for (let i = 1, at = ${rule.states}, t = from; i <= periods; i++, t++, at += ${rule.states}) {`,
    ...program.inside,
    lines(rule.states, (i) => `const n${i} = ${program.read(rule.next[i]!)};`),
    ...live.map(next),
    lines(rule.states, (i) => `s${i} = n${i};\nvalues[at + ${i}] = n${i};`),
    ...live.map(({ slot, unknown }) => `d${slot}_${unknown} = e${slot}_${unknown};`),
    `q += ${rule.states * unknowns};`,
    ...cells.map(writeCell),
    "}",
  ].join("\n");
}
