import { minimise } from "../../numeric/index.js";
import type { ComparedValue, ErrorFamily } from "./error-family.js";
import type { Scale } from "./scale.js";

/** What a record's values come to around other centres than those of a fit, with the same kind of errors. */
export interface Around {
  /** Log-likelihood of values around their `fitted` ones, the spread at its best. */
  readonly logLikelihood: (values: readonly ComparedValue[]) => number;
  /** The same, every set of values around one level of its own; the spread is common. */
  readonly logLikelihoodOfLevels: (sets: readonly (readonly ComparedValue[])[]) => number;
  /** Spreads that are found: 0 where it is known, or follows from the mean. */
  readonly spreads: number;
}

/** By the family of a fit. */
export function aroundOf(family: ErrorFamily, scale: Scale): Around {
  const spreads = family.spreads.length;
  const total = (values: readonly ComparedValue[], spread: number): number =>
    values.reduce((sum, value) => sum + family.logLikelihood(value, spread), 0);
  const best = (values: readonly ComparedValue[]): number => {
    if (spreads === 0) return total(values, 1);
    const exact = values.every(({ censoring }) => censoring === 0);
    if (exact && !family.counts) return total(values, spreadOf(values, family, scale));
    const start = Math.log(spreadOf(values, family, scale));
    const found = minimise((at) => -total(values, Math.exp(at[0]!)), Float64Array.of(start));
    return -found.value;
  };
  return {
    spreads,
    logLikelihood: best,
    logLikelihoodOfLevels(sets) {
      const levels = sets.map((values) => levelOf(values, family, scale));
      const placed = (at: (set: number) => number): ComparedValue[] =>
        sets.flatMap((values, set) => values.map((value) => ({ ...value, fitted: at(set) })));
      const start = placed((set) => levels[set]!);
      // Means are the likeliest levels of normal values and of counts, unless some are known only to a limit.
      if (start.every(({ censoring }) => censoring === 0)) return best(start);
      const spread = spreads === 0 ? [] : [Math.log(spreadOf(start, family, scale))];
      const found = minimise(
        (at) => {
          const values = placed((set) => scale.from(at[set]!));
          return -total(values, spreads === 0 ? 1 : Math.exp(at[sets.length]!));
        },
        Float64Array.from([...levels.map(scale.to), ...spread]),
      );
      return -found.value;
    },
  };
}

/** Weighted mean on the scale. */
function levelOf(values: readonly ComparedValue[], { counts }: ErrorFamily, { to, from }: Scale): number {
  const weights = values.reduce((sum, { root }) => sum + root * root, 0);
  const sum = values.reduce((all, { observed, root }) => all + root * root * to(observed), 0);
  // A level of 0 counts has no likelihood; any below the smallest share that a record can show does.
  return from(counts ? Math.max(sum / weights, 1e-9) : sum / weights);
}

/** The spread that the deviations show: their root mean square, or the excess of counts over a Poisson's. */
function spreadOf(values: readonly ComparedValue[], { counts }: ErrorFamily, { to }: Scale): number {
  if (counts) {
    const excess = values.reduce((sum, { observed, fitted }) => sum + (observed - fitted) ** 2 - fitted, 0);
    return Math.max(excess / values.reduce((sum, { fitted }) => sum + fitted * fitted, 0), 1e-4);
  }
  const squares = values.reduce(
    (sum, { observed, fitted, root }) => sum + (root * (to(observed) - to(fitted))) ** 2,
    0,
  );
  return Math.sqrt(squares / values.length);
}
