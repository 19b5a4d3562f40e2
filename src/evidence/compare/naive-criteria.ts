import {
  type ComparedValue,
  type Fit,
  freeUnknowns,
  type GroupFit,
  problemOf,
} from "../../estimate/index.js";

/** How well a record is told without any rule, on the values that its fits compare after the first. */
export interface NaiveCriterion {
  readonly name: "no change" | "mean level";
  readonly aicCorrected: number;
  /** Free unknowns, the spread among them. */
  readonly counted: number;
}

/** A fit beside the naive rules. */
export interface BesideNaive {
  readonly naive: readonly NaiveCriterion[];
  readonly own: Omit<NaiveCriterion, "name">;
}

/**
 * AICc of the naive rules, and of a fit on the same values with the same distribution of errors: those that have a
 * recorded value before them.
 *
 * "No change" carries the last value on, "mean level" has each value scatter about one level; neither has a parameter
 * beside those and the spread. A trajectory fit also compares its first value, which is left out here. Groups fitted
 * together are one likelihood with one spread, each with a level of its own.
 *
 * @param from - first step index counted: 1, or more where rivals read past values and begin later.
 */
export function naiveCriteria(fit: Fit, from = 1): BesideNaive {
  const together = problemOf(fit).groups !== "separate";
  const units = together ? [fit.groups] : fit.groups.map((group) => [group]);
  const told = units.map((groups) => unitCriteria(fit, groups, from));
  const sum = (of: (unit: UnitCriteria) => Criterion): Criterion =>
    told.reduce(
      (all, unit) => ({
        aicCorrected: all.aicCorrected + of(unit).aicCorrected,
        counted: all.counted + of(unit).counted,
      }),
      { aicCorrected: 0, counted: 0 },
    );
  return {
    own: sum((unit) => unit.own),
    naive: [
      { name: "no change", ...sum((unit) => unit.change) },
      { name: "mean level", ...sum((unit) => unit.level) },
    ],
  };
}

type Criterion = Omit<NaiveCriterion, "name">;

interface UnitCriteria {
  readonly own: Criterion;
  readonly change: Criterion;
  readonly level: Criterion;
}

/** The criteria of groups that share one likelihood. */
function unitCriteria(fit: Fit, groups: readonly GroupFit[], from: number): UnitCriteria {
  const { around } = problemOf(fit);
  const sets = groups.flatMap((group) => fit.rule.states.map((state) => valuesOf(fit, group, state, from)));
  const own = sets.flatMap((set) => set.map(({ value }) => value));
  const before = sets.flatMap((set) => set.map(({ value, last }) => ({ ...value, fitted: last })));
  const levels = sets.map((set) => set.map(({ value }) => value)).filter((set) => set.length > 0);
  const estimates = [...(fit.population ?? []), ...groups.flatMap((group) => group.estimates)];
  const free = fit.population ? freeUnknowns(fit) : estimates.length;
  const { spreads } = around;
  const counted = estimates.some(({ role }) => role === "scale") ? free : free + spreads;
  const count = own.length;
  return {
    own: criterion(around.logLikelihood(own), count, counted),
    change: criterion(around.logLikelihood(before), count, spreads),
    level: criterion(around.logLikelihoodOfLevels(levels), count, levels.length + spreads),
  };
}

/** Compared values of one state, each with the recorded value before it. */
function valuesOf(
  fit: Fit,
  group: GroupFit,
  state: string,
  from: number,
): readonly { readonly value: ComparedValue; readonly last: number }[] {
  const { recorded } = problemOf(fit).group(group.group);
  return group.points
    .filter((point) => point.state === state && point.index >= from)
    .map(({ observed, fitted, censoring, weight, index }) => ({
      value: { observed, fitted, censoring, root: Math.sqrt(weight) },
      last: recorded.values[state]![recorded.index.indexOf(index) - 1]!,
    }));
}

/** AICc; infinite where there are too few values. */
function criterion(logLikelihood: number, count: number, counted: number): Criterion {
  const room = count - counted - 1;
  const aic = 2 * counted - 2 * logLikelihood;
  const aicCorrected =
    room > 0 && Number.isFinite(aic) ? aic + (2 * counted * (counted + 1)) / room : Number.POSITIVE_INFINITY;
  return { aicCorrected, counted };
}
