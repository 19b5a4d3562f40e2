import type { Warning } from "../../numeric/index.js";
import type { GroupFit } from "./group-fit.js";

/** Correlation of two estimates above which they are named as hard to separate: common practice, no source. */
const strong = 0.99;
/**
 * Relative error from which on an estimate counts as poorly known, and as not known at all: common practice, no source. A
 * slope and an intercept are always strongly correlated in a record far from 0, and may both be known well.
 */
const poor = 0.5;
const unknown = 2;

/** Two estimates whose errors go together. */
interface Pair {
  readonly names: readonly [string, string];
  readonly correlation: number;
  readonly combination: "product" | "ratio";
  /** Relative errors: of the better and the worse of the two, and of the product or ratio, whichever is known better. */
  readonly better: number;
  readonly alone: number;
  readonly together: number;
}

/** Pairs of estimates that are hard to separate, each with the combination of them that the record does tell. */
export function correlationWarnings(fit: Pick<GroupFit, "estimates" | "covariance">): Warning[] {
  return pairsOf(fit)
    .filter(({ correlation, better }) => Math.abs(correlation) > strong && better > poor)
    .map(({ names: [a, b], correlation, combination, alone, together }) => {
      const known =
        together < alone / 2
          ? `their ${combination} is known to ${percent(together)}, ${alone > unknown ? "but not both of them" : `they themselves to ${percent(alone)}`}`
          : "a combination of them is known better than either";
      return {
        code: "strong-correlation",
        message: `${a} and ${b} are hard to separate (correlation ${correlation.toFixed(3)}): ${known}.`,
      };
    });
}

const percent = (share: number): string => `${(100 * share).toPrecision(2)}%`;

function pairsOf({ estimates, covariance }: Pick<GroupFit, "estimates" | "covariance">): Pair[] {
  const size = estimates.length;
  return estimates.flatMap((a, i) =>
    estimates.slice(i + 1).map((b, k): Pair => {
      const j = i + 1 + k;
      const [own, other, shared] = [
        covariance[i * size + i]!,
        covariance[j * size + j]!,
        covariance[i * size + j]!,
      ];
      // On the relative scale: var(ln a +- ln b), the sign being the one at which the errors cancel.
      const cross = shared / (a.value * b.value);
      const squares = own / a.value ** 2 + other / b.value ** 2;
      return {
        names: [a.name, b.name],
        correlation: shared / Math.sqrt(own * other),
        combination: cross < 0 ? "product" : "ratio",
        better: Math.sqrt(Math.min(own / a.value ** 2, other / b.value ** 2)),
        alone: Math.sqrt(Math.max(own / a.value ** 2, other / b.value ** 2)),
        together: Math.sqrt(Math.max(0, squares - 2 * Math.abs(cross))),
      };
    }),
  );
}
