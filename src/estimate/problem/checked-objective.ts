import type { StopReason } from "../../numeric/index.js";
import type { Lowest, Objective } from "../search/objective.js";

/** Searches from where one stopped short, at most. */
const rounds = 3;
/** An optimum is one where no unknown alone would bring more than this, in units of twice the log-likelihood. */
const negligible = 1e-4;
/** Differences that are taken relative to an unknown, and of one near 0 relative to its start. */
const relativeStep = 1e-4;

const stillFalling: StopReason = {
  kind: "failed",
  reason: "the likelihood still rises where the search stopped",
};

/**
 * An objective whose searches say "converged" only where the gradient agrees: one that stopped on a slope is taken up
 * again from there, and else says that it failed.
 */
export function checkedObjective(objective: Objective): Objective {
  const { value } = objective;
  return {
    ...objective,
    minimise(start, lower, upper) {
      let found = objective.minimise(start, lower, upper);
      for (let round = 0; found.stop.kind === "converged"; round++) {
        const better = downhill(value, found, start, lower, upper);
        if (better === undefined) return found;
        if (round === rounds) return { ...found, stop: stillFalling };
        const again = objective.minimise(better, lower, upper);
        found = { ...again, evaluations: found.evaluations + again.evaluations };
      }
      return found;
    },
  };
}

/** A lower point beside the end of a search, along one unknown; undefined where there is none to speak of. */
function downhill(
  value: Objective["value"],
  { estimates, value: here }: Lowest,
  start: Float64Array,
  lower: Float64Array,
  upper: Float64Array,
): Float64Array | undefined {
  const at = estimates.slice();
  for (let i = 0; i < at.length; i++) {
    const own = estimates[i]!;
    const step = relativeStep * Math.max(Math.abs(own), 1e-3 * (Math.abs(start[i]!) || 1));
    const valueAt = (place: number): number => {
      at[i] = Math.min(Math.max(place, lower[i]!), upper[i]!);
      const found = value(at);
      at[i] = own;
      return found;
    };
    const [below, above] = [valueAt(own - step), valueAt(own + step)];
    const curvature = (below + above - 2 * here) / (step * step);
    const slope = (above - below) / (2 * step);
    const away = curvature > 0 ? -slope / curvature : -Math.sign(slope) * 100 * step;
    if (!Number.isFinite(away) || own + away < lower[i]! || own + away > upper[i]!) continue;
    if (valueAt(own + away) < here - negligible) {
      at[i] = own + away;
      return at;
    }
  }
  return undefined;
}
