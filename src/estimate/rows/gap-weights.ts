import type { FitOptions } from "../options/fit-options.js";
import { conditionals, type ReachedCell } from "./gap-errors.js";
import type { SteppedCells } from "./stepped-cells.js";

/** Weights of values reached over gaps, and what those before each lead one to expect of its error. */
export interface GapWeights {
  /** By value: the share of the errors of the values reached from the same row before it; none where it stands alone. */
  readonly shares: readonly Float64Array[];
  /**
   * Writes roots and shares anew from the covariance of the errors of values reached from one row; says whether a root or a
   * share changed.
   */
  readonly weigh: (
    covarianceOf: (origin: number, reached: readonly ReachedCell[]) => Float64Array,
  ) => boolean;
}

/** Relative change that counts. */
const settled = 1e-9;

/**
 * The weights of a record with gaps, at first those of steps whose errors are carried on as they are.
 *
 * @param roots - [values]: roots of the values' own weights; written to.
 * @returns undefined where no pair spans a gap, and for counts, whose variance does not add up over steps.
 */
export function gapWeights(
  { firsts, spans, states, origins, longest }: SteppedCells,
  roots: Float64Array,
  { distribution }: FitOptions,
): GapWeights | undefined {
  if (longest === 1 || distribution === "poisson" || distribution === "negative-binomial") return undefined;
  const plain = roots.slice();
  const shares: Float64Array[] = Array.from(roots, () => new Float64Array(0));
  const weigh: GapWeights["weigh"] = (covarianceOf) => {
    let changed = false;
    for (let first = 0; first < roots.length; ) {
      const end = firsts.findIndex((each, i) => i >= first && each !== first);
      const size = (end < 0 ? roots.length : end) - first;
      const reached = Array.from({ length: size }, (_, k) => ({
        span: spans[first + k]!,
        state: states[first + k]!,
      }));
      if (reached.some(({ span }) => span > 1))
        conditionals(covarianceOf(origins[first]!, reached), size).forEach(
          ({ deviation, shares: own }, k) => {
            const root = plain[first + k]! / deviation;
            changed ||= Math.abs(root - roots[first + k]!) > settled * root;
            roots[first + k] = root;
            shares[first + k] = own;
          },
        );
      first += size;
    }
    return changed;
  };
  weigh((_, reached) => carriedOn(reached));
  return { shares, weigh };
}

/** Covariance of errors that later steps carry on as they are: two values of a state share the steps before both. */
function carriedOn(reached: readonly ReachedCell[]): Float64Array {
  return Float64Array.from({ length: reached.length ** 2 }, (_, e) => {
    const [one, other] = [reached[Math.floor(e / reached.length)]!, reached[e % reached.length]!];
    return one.state === other.state ? Math.min(one.span, other.span) : 0;
  });
}
