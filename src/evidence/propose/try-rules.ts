import { type Fit, type FitOptions, fit as fitRule, freeUnknowns } from "../../estimate/index.js";
import { ModelError, type Tick } from "../../numeric/index.js";
import type { Observations } from "../../record/index.js";
import { type NaiveCriterion, naiveCriteria } from "../compare/naive-criteria.js";
import type { Candidate, NotTried } from "./candidates.js";

/** Step index from which every candidate compares values: the longest lag among them is one. */
const firstShared = 2;

/** A rule fitted with one kind of error. */
export interface Tried {
  readonly name: string;
  readonly errors: "process" | "observation";
  readonly fit: Fit;
  readonly unknowns: number;
  readonly logLikelihood: number;
  /** On the values after the first two, which every rule, both kinds of error and the naive rules compare. */
  readonly aicCorrected: number;
  readonly naive: readonly NaiveCriterion[];
}

/** Fits every candidate; those that could not be fitted come with the reason. */
export function tryRules(
  candidates: readonly Candidate[],
  observations: Observations,
  kinds: readonly ("process" | "observation")[],
  options: Omit<FitOptions, "errors">,
  tick: Tick,
): { readonly tried: readonly Tried[]; readonly failed: readonly NotTried[] } {
  const tried: Tried[] = [];
  const failed: NotTried[] = [];
  for (const { name, rule, bounds } of candidates)
    for (const errors of kinds) {
      const fit = fitOrReason(() =>
        fitRule(rule, observations, {
          ...options,
          errors,
          intervals: "none",
          bounds: { ...bounds, ...options.bounds },
        }),
      );
      tick();
      if (typeof fit === "string") failed.push({ name, reason: fit });
      else tried.push(described(name, errors, fit));
    }
  return { tried, failed };
}

function fitOrReason(attempt: () => Fit): Fit | string {
  try {
    return attempt();
  } catch (cause) {
    if ((cause as Error).name === ModelError.name) return (cause as Error).message;
    throw cause;
  }
}

function described(name: string, errors: Tried["errors"], fit: Fit): Tried {
  const { own, naive } = naiveCriteria(fit, firstShared);
  return {
    name,
    errors,
    fit,
    unknowns: freeUnknowns(fit),
    logLikelihood: fit.criteria.logLikelihood,
    aicCorrected: own.aicCorrected,
    naive,
  };
}
