import type { Fit } from "../../estimate/index.js";
import { randomStream } from "../../numeric/index.js";
import { compileRule, type Rule } from "../../rule/index.js";

/** How a rule is the special case of another. */
export interface Nesting {
  /** Parameters of the larger rule, and the value at which it becomes the smaller. */
  readonly at: Readonly<Record<string, number>>;
}

/** Values at which parameters of named rules tend to drop out. */
const neutral = [0, 1, -1, 2];
const trials = 12;

/**
 * Whether one fit's rule is the other's with parameters held at a value: the same rule with more of them held, or rules
 * that name the others alike and step alike at every place tried.
 *
 * @returns undefined where no such values are found; rules that are one only in a limit are not found.
 */
export function nestingOf(smaller: Fit, larger: Fit): Nesting | undefined {
  const few = freeOf(smaller);
  const many = freeOf(larger);
  const extra = many.filter((name) => !few.includes(name));
  if (extra.length === 0 || extra.length > 2 || few.some((name) => !many.includes(name))) return undefined;
  const held = Object.fromEntries(extra.map((name) => [name, smaller.groups[0]!.parameters[name]]));
  const choices =
    smaller.rule.text === larger.rule.text ? [held as Record<string, number>] : combinations(extra);
  const at = choices.find((choice) => stepAlike(smaller, larger, choice));
  return at && { at };
}

/** Parameters that a fit estimates. */
function freeOf(fit: Fit): readonly string[] {
  return fit.groups[0]!.estimates.filter(({ role }) => role === "parameter").map(({ name }) => name);
}

function combinations(names: readonly string[]): Record<string, number>[] {
  return names.reduce<Record<string, number>[]>(
    (all, name) => all.flatMap((values) => neutral.map((value) => ({ ...values, [name]: value }))),
    [{}],
  );
}

/** Compares single steps at places scattered about the estimates. */
function stepAlike(smaller: Fit, larger: Fit, extra: Readonly<Record<string, number>>): boolean {
  if (smaller.rule.states.join() !== larger.rule.states.join()) return false;
  if (smaller.rule.inputs.join() !== larger.rule.inputs.join()) return false;
  if (smaller.rule.lags.length + larger.rule.lags.length > 0) return smaller.rule.text === larger.rule.text;
  const stream = randomStream(1);
  const base = { ...larger.groups[0]!.parameters, ...smaller.groups[0]!.parameters, ...extra };
  const group = smaller.observations.groups[0]!;
  for (let trial = 0; trial < trials; trial++) {
    const shift = (): number => 0.6 + 0.8 * stream.uniform();
    const parameters = Object.fromEntries(
      Object.entries(base).map(([name, value]) => [name, name in extra ? value : value * shift()]),
    );
    const state = smaller.rule.states.map(
      (name) => group.values[name]![trial % group.index.length]! * shift(),
    );
    const inputs = smaller.rule.inputs.map(() => new Float64Array(3).fill(shift()));
    const one = stepOf(smaller.rule, parameters, state, inputs);
    const other = stepOf(larger.rule, parameters, state, inputs);
    const alike = one.every(
      (value, s) => Math.abs(value - other[s]!) <= 1e-9 * Math.max(1e-300, Math.abs(value)),
    );
    if (!alike) return false;
  }
  return true;
}

function stepOf(
  rule: Rule,
  parameters: Readonly<Record<string, number>>,
  state: readonly number[],
  inputs: readonly Float64Array[],
): Float64Array {
  const next = new Float64Array(state.length);
  const values = Float64Array.from(rule.parameters, (name) => parameters[name] ?? Number.NaN);
  compileRule(rule).step(Float64Array.from(state), values, inputs, 0, next);
  return next;
}
