import type { Rule } from "../../rule/index.js";
import type { ErrorKind, FitOptions } from "../options/fit-options.js";

/** What a fit was made with, a phrase each, by which fits of one rule can be told apart; "" where it is left open. */
export interface FitAspects {
  readonly errors: string;
  readonly distribution: string;
  readonly groups: string;
  readonly held: string;
  readonly sd: string;
  readonly robust: string;
  readonly bounds: string;
  readonly initial: string;
  readonly factor: string;
}

const errorWords: Readonly<Record<ErrorKind, string>> = {
  process: "error in the process",
  observation: "error in the observation",
  both: "error in both",
};

export function aspectsOf(rule: Rule, options: FitOptions): FitAspects {
  return {
    errors: errorWords[options.errors],
    distribution: options.distribution ?? "normal",
    groups: `groups ${options.groups ?? "separate"}`,
    held: listed({ ...rule.fixed, ...options.fixed }, (name, value) => `${name} held at ${value}`),
    sd: options.sd === undefined ? "" : `sd ${options.sd}`,
    robust: options.robust === true ? "robust" : "",
    bounds: listed(
      { ...rule.bounds, ...options.bounds },
      (name, [low, high]) => `${name} from ${low} to ${high}`,
    ),
    initial: listed({ ...rule.initial, ...options.initial }, (name, value) => `${name} begins at ${value}`),
    factor: listed(options.factor ?? {}, (state, name) => `${state} read by the factor ${name}`),
  };
}

function listed<T>(given: Readonly<Record<string, T>>, say: (name: string, value: T) => string): string {
  return Object.entries(given)
    .map(([name, value]) => say(name, value))
    .join(", ");
}
