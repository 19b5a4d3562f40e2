import { randomStream, type Tick } from "../../numeric/index.js";
import { type ErrorAdvice, errorAdvice } from "../check/error-advice.js";
import type { Tried } from "./try-rules.js";

/** Records drawn with each kind of error, for the advice. */
export const adviceDraws = 60;

/**
 * Which kind of error the record speaks for, by the rule that explains it best with either: where the two rules do not
 * agree it is left open.
 */
export function adviceOn(tried: readonly Tried[], seed: number, tick: Tick): ErrorAdvice | undefined {
  const best = (kind: Tried["errors"]): Tried | undefined =>
    tried
      .filter((each) => each.errors === kind)
      .reduce<Tried | undefined>(
        (low, next) => (low && low.aicCorrected <= next.aicCorrected ? low : next),
        undefined,
      );
  const [first, second] = [best("process"), best("observation")].map(
    (each) => each && errorAdvice(each.fit, each.fit.groups[0]!, adviceDraws, randomStream(seed), tick),
  );
  if (first === undefined || second === undefined || first.kind === second.kind) return first ?? second;
  return first.kind === "undecided" ? first : second.kind === "undecided" ? second : undefined;
}
