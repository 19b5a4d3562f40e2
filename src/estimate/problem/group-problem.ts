import type { RandomStream } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import type { GroupFit } from "../result/group-fit.js";
import { valueTable } from "../rows/value-table.js";
import { type Unknowns, unknownsOf } from "../unknowns/unknowns.js";
import { type Beginning, beginningOf } from "./beginning.js";
import { type Held, heldAt } from "./held.js";
import { censoringOf } from "./likelihood-search.js";
import { type FittedNoise, fittedNoise } from "./noise.js";
import { type Refitter, refitterOf } from "./refitter.js";
import { type ResidualKind, residualsOf } from "./residuals.js";
import { scaleOf } from "./scale.js";
import type { FitKind, Search } from "./search.js";
import { kindOf, searchOf } from "./search-of.js";

/** One group of a fit at its estimates, as every function that works on with it sees it. */
export interface GroupProblem {
  readonly kind: FitKind;
  readonly recorded: ObservedGroup;
  readonly fitted: GroupFit;
  readonly unknowns: Unknowns;
  /** What scatters a period, and what a reading. */
  readonly noise: FittedNoise;
  /** Whether its scatter was found as the sigma of residuals, whose own uncertainty n - p tells. */
  readonly findsSigma: boolean;
  /** Where the trajectory begins that leads on after a period; by default after the last one recorded. */
  readonly beginning: (after?: number) => Beginning;
  /** The residuals to be tested: `raw`, `quantile` of counts and limits, `pearson` of a filter's predictions. */
  readonly tested: ResidualKind;
  readonly residuals: (kind: ResidualKind, stream: RandomStream) => Float64Array;
  /** The fit with one unknown held, from where another one ended; undefined where the rule cannot be run there. */
  readonly hold: (name: string, value: number, from?: Held) => Held | undefined;
  /**
   * Increase of the objective over the optimum at unknowns as they are reported, in units of the profile: sigma^2, or
   * twice the log-likelihood; infinite where the rule cannot be run. Undefined where groups are fitted together.
   */
  readonly increase: ((estimates: Float64Array) => number) | undefined;
  /** The fit made ready to be done again, given other values; undefined where groups are fitted together. */
  readonly refitter: () => Refitter | undefined;
}

/** @param together - whether other groups share its parameters, so that it cannot be fitted by itself. */
export function groupProblem(
  rule: Rule,
  recorded: ObservedGroup,
  fitted: GroupFit,
  options: FitOptions,
  together: boolean,
): GroupProblem {
  const kind = kindOf(rule, recorded, options);
  const own = together ? unknownsOf(rule, options) : undefined;
  const fresh = (): Search => {
    const made = searchOf(rule, recorded, options, fitted.filter);
    made.settle?.(estimatesIn(made.unknowns, fitted));
    return made;
  };
  // Made when first asked for: a forecast needs none. It is never given other values.
  let kept: Search | undefined;
  let best: number | undefined;
  const search = (): Search => {
    kept ??= fresh();
    return kept;
  };
  const { distribution = "normal" } = options;
  const counts = distribution === "poisson" || distribution === "negative-binomial";
  return {
    kind,
    recorded,
    fitted,
    get unknowns() {
      return own ?? search().unknowns;
    },
    noise: fittedNoise(rule, recorded, fitted, options),
    findsSigma: kind !== "state-space" && !counts && options.sd === undefined,
    beginning: (after = recorded.index[recorded.index.length - 1]!) =>
      beginningOf(rule, recorded, fitted, options, scaleOf(options), after),
    tested: ({ "least-squares": "raw", likelihood: "quantile", "state-space": "pearson" } as const)[kind],
    residuals(wanted, stream) {
      if (together) return Float64Array.from(fitted.points, ({ residual }) => residual);
      const at = estimatesIn(search().unknowns, fitted);
      return residualsOf(
        search(),
        censoringOf(rule, recorded, search().rows),
        at,
        fitted.sigma,
        wanted,
        stream,
      );
    },
    hold(name, value, from) {
      if (together) return undefined;
      const at = estimatesIn(search().unknowns, fitted);
      const i = search().unknowns.names.indexOf(name);
      return i < 0 ? undefined : heldAt(search(), search().objective.value(at), i, value, from?.at ?? at);
    },
    increase: together
      ? undefined
      : (estimates) => {
          const { objective, unknowns, cutAt } = search();
          best ??= objective.value(estimatesIn(unknowns, fitted));
          const value = objective.value(
            estimates.map((each, i) => (unknowns.rooted[i] ? each * each : each)),
          );
          const increase = (value - best) / cutAt(best).variance;
          return Number.isNaN(increase) ? Number.POSITIVE_INFINITY : Math.max(0, increase);
        },
    refitter() {
      if (together) return undefined;
      const again = fresh();
      const at = estimatesIn(again.unknowns, fitted);
      return refitterOf(again, valueTable(rule, recorded), at, fitted.sigma);
    },
  };
}

/** The estimates as a search holds them: variances where standard deviations are reported. */
function estimatesIn({ rooted }: Unknowns, { estimates }: GroupFit): Float64Array {
  return Float64Array.from(estimates, ({ value }, i) => (rooted[i] ? value * value : value));
}
