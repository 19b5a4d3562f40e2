import type { Observations, ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { Fit } from "../fit.js";
import type { ErrorDistribution, ErrorKind, FitOptions } from "../options/fit-options.js";
import { type Around, aroundOf } from "./around.js";
import { aspectsOf, type FitAspects } from "./aspects.js";
import { errorFamily } from "./error-family.js";
import { type GroupProblem, groupProblem } from "./group-problem.js";
import { type Scale, scaleOf } from "./scale.js";
import type { FitKind } from "./search.js";
import { kindOf } from "./search-of.js";

/** What may be different when a fit is done again. */
export interface RefitChanges {
  /** Another record, or part of the same one. */
  readonly observations?: Observations;
  /** Where the error lies instead. */
  readonly errors?: ErrorKind;
  /** Whether groups have parameters of their own. */
  readonly groups?: "separate" | "combined";
  /** Where the search begins; what is not named as before. */
  readonly start?: Readonly<Record<string, number>>;
  readonly intervals?: "profile" | "none";
}

/**
 * What a fit searched, decided once when it was made. Whoever works on with a fit asks this instead of its options.
 */
export interface FitProblem {
  readonly kind: FitKind;
  readonly errors: ErrorKind;
  readonly distribution: ErrorDistribution;
  readonly scale: Scale;
  /** Whether every group has parameters of its own. */
  readonly groups: "separate" | "combined" | "mixed";
  /** Of the intervals. */
  readonly level: number;
  /** By state that the record reads only up to an unknown factor: the name of the factor. */
  readonly factors: Readonly<Record<string, string>>;
  /** What the fit was made with, in words. */
  readonly aspects: FitAspects;
  /** Lowest and highest admitted value of a parameter or initial state. */
  readonly bounds: (name: string) => readonly [number, number];
  /** What its values come to around other centres; of a filter as if its predictions had one variance. */
  readonly around: Around;
  /** One group at its estimates. */
  readonly group: (name: string) => GroupProblem;
  /** The same fit of another record, or with other errors. */
  readonly refit: (changes: RefitChanges) => Fit;
}

const open: readonly [number, number] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];

/**
 * @param fit - the fit that the problem belongs to; its groups are looked up when they are first asked for.
 * @param fitAgain - fits a rule to a record.
 */
export function fitProblem(
  fit: Pick<Fit, "rule" | "observations" | "options" | "groups">,
  fitAgain: (rule: Rule, observations: Observations, options: FitOptions) => Fit,
): FitProblem {
  const { rule, observations, options } = fit;
  const recorded = (name: string): ObservedGroup => observations.groups.find((each) => each.name === name)!;
  const kinds = observations.groups.map((group) => kindOf(rule, group, options));
  const together = observations.groups.length > 1 ? (options.groups ?? "separate") : "separate";
  const made = new Map<string, GroupProblem>();
  return {
    kind: kinds.find((kind) => kind !== "least-squares") ?? "least-squares",
    errors: options.errors,
    distribution: options.distribution ?? "normal",
    scale: scaleOf(options),
    groups: together,
    level: options.level ?? 0.95,
    around: aroundOf(errorFamily(options), scaleOf(options)),
    factors: options.factor ?? {},
    aspects: aspectsOf(rule, options),
    bounds: (name) => options.bounds?.[name] ?? rule.bounds[name] ?? open,
    group(name) {
      const known = made.get(name);
      if (known !== undefined) return known;
      const fitted = fit.groups.find((each) => each.group === name)!;
      const problem = groupProblem(rule, recorded(name), fitted, options, together !== "separate");
      made.set(name, problem);
      return problem;
    },
    refit(changes) {
      const { observations: other = observations, errors = options.errors, start, intervals } = changes;
      const { groups: before, ...rest } = options;
      const groups = changes.groups ?? before;
      return fitAgain(rule, other, {
        ...rest,
        errors,
        // A group taken out of a fit of several stands by itself.
        ...(groups && other.groups.length > 1 && { groups }),
        ...(start && { start: { ...start, ...rest.start } }),
        ...(intervals && { intervals }),
      });
    },
  };
}
