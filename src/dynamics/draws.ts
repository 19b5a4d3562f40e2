import type { RandomStream } from "../numeric/index.js";
import { compileRule, type ProcessNoise, type Rule } from "../rule/index.js";
import { inputColumns } from "./input-columns.js";
import { type NoiseTerm, noiseTerms, withNoise } from "./noise-terms.js";
import type { PathOptions } from "./path.js";
import { unreadableOption } from "./refusals.js";
import { constantsBySlot, initialVector } from "./setting.js";

export interface DrawsOptions extends PathOptions {
  /** By state; default what the rule says. A state that is not named has no random change. */
  readonly noise?: Readonly<Record<string, ProcessNoise>>;
  readonly paths: number;
  readonly stream: RandomStream;
}

/** Many paths of one rule, each with its own random change. */
export interface Draws {
  readonly kind: "draws";
  readonly rule: Rule;
  readonly paths: number;
  readonly periods: number;
  readonly from: number;
  /** By state: [paths, periods + 1], row-major. A value that leaves the finite range stays as it came. */
  readonly values: Readonly<Record<string, Float64Array>>;
}

/** Paths that share a stream. Block b draws from the given stream jumped b + 1 times, whoever runs it. */
const blockSize = 64;

type Step = (state: Float64Array, t: number) => void;

function applyNoise(state: Float64Array, terms: readonly NoiseTerm[], stream: RandomStream): void {
  for (const term of terms) state[term.slot] = withNoise(state[term.slot]!, term, stream.normal());
}

function runPath(
  step: Step,
  state: Float64Array,
  options: Required<Pick<DrawsOptions, "periods" | "from">>,
  change: (state: Float64Array) => void,
  write: (row: number) => void,
): void {
  write(0);
  for (let row = 1; row <= options.periods; row++) {
    step(state, options.from + row - 1);
    change(state);
    write(row);
  }
}

/**
 * Draws many paths of a rule with random change in every period: additive, or as a factor of mean 1.
 *
 * @param options.stream - paths are drawn in blocks of 64 from successive jumps of it; it is not advanced itself.
 * @returns values by state [paths, periods + 1].
 * @throws {ModelError} as `path`.
 * @example draws(rule, { constants, initial, periods: 20, paths: 1000, noise: { N: { kind: "lognormal", sd: 0.1 } }, stream: randomStream(1) })
 */
export function draws(rule: Rule, options: DrawsOptions): Draws {
  const { periods, paths, from = 0 } = options;
  for (const [name, value] of Object.entries({ periods, paths })) {
    if (!Number.isSafeInteger(value) || value < 0)
      throw unreadableOption(name, "a whole number from 0 on", value);
  }
  const constants = constantsBySlot(rule, options.constants);
  const initial = initialVector(rule, options.initial);
  const inputs = inputColumns(rule, options.inputs, from, periods);
  const terms = noiseTerms(rule, options.noise ?? rule.noise, constants);
  const compiled = compileRule(rule);
  const step: Step = (state, t) => compiled.step(state, constants, inputs, t, state);
  const columns = rule.states.map(() => new Float64Array(paths * (periods + 1)));
  let stream = options.stream;
  for (let k = 0; k < paths; k++) {
    if (k % blockSize === 0) stream = stream.jump();
    const block = stream;
    const state = initial.slice();
    const write = (row: number): void => {
      columns.forEach((column, slot) => {
        column[k * (periods + 1) + row] = state[slot]!;
      });
    };
    runPath(step, state, { periods, from }, (at) => applyNoise(at, terms, block), write);
  }
  const values = Object.freeze(Object.fromEntries(rule.states.map((name, slot) => [name, columns[slot]!])));
  return Object.freeze({ kind: "draws", rule, paths, periods, from, values });
}
