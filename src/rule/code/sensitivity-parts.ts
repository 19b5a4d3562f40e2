import type { RuleGraph } from "../graph/rule-graph.js";
import { stepJacobian } from "../graph/step-jacobian.js";
import { type EmittedProgram, emitProgram } from "./emit-program.js";
import { sensitivityPattern } from "./sensitivity-pattern.js";

/** A sensitivity held in a local variable: of which slot, to which unknown, and its position in a row of the table. */
export interface SensitivityCell {
  readonly slot: number;
  readonly unknown: number;
  readonly at: number;
  /** Whether it can ever differ from zero. */
  readonly live: boolean;
}

/** The source parts of every function that computes sensitivities along a path. */
export interface SensitivityParts {
  readonly program: EmittedProgram;
  readonly cells: readonly SensitivityCell[];
  /** `let` lines at the initial state. */
  readonly declared: readonly string[];
  /** `const` lines of the next period, and the lines that assign them. */
  readonly next: readonly string[];
  readonly moved: readonly string[];
}

/** The line that computes one sensitivity in the next period; terms that are always zero are left out. */
function nextLine(
  rule: RuleGraph,
  pattern: readonly (readonly boolean[])[],
  program: EmittedProgram,
  { slot, unknown }: SensitivityCell,
): string {
  const { byState, byParameter } = stepJacobian(rule);
  const slopes = byState[slot]!.map(program.read);
  const terms = slopes.flatMap((slope, k) => {
    if (slope === "0" || !pattern[k]![unknown]) return [];
    return [slope === "1" ? `d${k}_${unknown}` : `${slope} * d${k}_${unknown}`];
  });
  const own = unknown < rule.parameters ? program.read(byParameter[slot]![unknown]!) : "0";
  if (own !== "0") terms.push(own);
  return `const e${slot}_${unknown} = ${terms.length === 0 ? "0" : terms.join(" + ")};`;
}

/** Recurrence of the sensitivities: d x' / d p = sum over states (d f / d x)(d x / d p) + d f / d p. */
export function sensitivityParts(rule: RuleGraph): SensitivityParts {
  const { byState, byParameter } = stepJacobian(rule);
  const program = emitProgram([...rule.next, ...byState.flat(), ...byParameter.flat()]);
  const pattern = sensitivityPattern(rule);
  const unknowns = rule.parameters + rule.states;
  const cells = rule.next.flatMap((_, slot) =>
    Array.from({ length: unknowns }, (_, unknown) => ({
      slot,
      unknown,
      at: slot * unknowns + unknown,
      live: pattern[slot]![unknown]!,
    })),
  );
  const live = cells.filter((cell) => cell.live);
  return {
    program,
    cells,
    declared: live.map(
      ({ slot, unknown }) => `let d${slot}_${unknown} = ${unknown === rule.parameters + slot ? 1 : 0};`,
    ),
    next: live.map((cell) => nextLine(rule, pattern, program, cell)),
    moved: live.map(({ slot, unknown }) => `d${slot}_${unknown} = e${slot}_${unknown};`),
  };
}
