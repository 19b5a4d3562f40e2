import { type Fit, type FittedNoise, problemOf, type Scale } from "../../estimate/index.js";
import { quantile, type RandomStream, randomStream } from "../../numeric/index.js";
import { centralPath, type Ground, noiseDraw } from "../../projection/index.js";
import { type DecisionContext, decisionContext } from "../setting/decision-context.js";
import { drawnGrounds } from "../setting/setting-margin.js";

/** Parameters drawn from a fit, with what each says of readings to come; values on the fitting scale. */
export interface SimulatedReadings {
  readonly context: DecisionContext;
  readonly grounds: readonly Ground[];
  /** [draws][rows of the path]: the value that a reading is scattered around. */
  readonly centres: readonly Float64Array[];
  /** [rows]: scatter of a reading around it; with errors in the process it grows from the present on. */
  readonly scatter: Float64Array;
  readonly scale: Scale;
}

/** What is simulated of a fit. */
export interface SimulateReadingsOptions {
  readonly periods: number;
  readonly group?: string;
  readonly state: number;
  readonly draws: number;
  readonly replicates: number;
  readonly seed: number;
}

/** Draws parameters of a fit and runs each as far as readings may be taken. */
export function simulatedReadings(fit: Fit, options: SimulateReadingsOptions): SimulatedReadings {
  const { state, draws, replicates, seed, group, periods } = options;
  const context = decisionContext(fit, { periods, seed, ...(group !== undefined && { group }) });
  const { scale } = problemOf(fit);
  const { grounds, factors } = drawnGrounds(context, draws);
  // What is read of a state is its factor times it, and every draw has a factor of its own.
  const factor = (draw: number): number => factors[state]?.[draw] ?? 1;
  const centres = grounds.map((ground, k) =>
    Float64Array.from(centralPath(ground).values[state]!, (value) => scale.to(factor(k) * value)),
  );
  const { reading, change } = problemOf(fit).group(context.fitGround!.group.group).noise;
  const noise = reading[state];
  const rows = context.ground.periods + 1;
  const alone = noise !== undefined && "sd" in noise ? noise.sd / Math.sqrt(replicates) : undefined;
  const scatter =
    alone === undefined
      ? processScatter(change, context, grounds, centres, state, scale, randomStream(seed).jump())
      : new Float64Array(rows).fill(alone);
  return { context, grounds, centres, scatter, scale };
}

/** Scatter of single values around their draw's path, from one noisy run of every draw. */
function processScatter(
  change: FittedNoise["change"],
  context: DecisionContext,
  grounds: readonly Ground[],
  centres: readonly Float64Array[],
  state: number,
  scale: Scale,
  stream: RandomStream,
): Float64Array {
  const draws = change.map((noise) => noise && noiseDraw(noise));
  const rows = context.ground.periods + 1;
  const offsets = Array.from({ length: rows }, () => new Float64Array(grounds.length));
  grounds.forEach((ground, k) => {
    const at = ground.initial.slice();
    for (let t = 1; t < rows; t++) {
      ground.compiled.step(at, ground.parameters, ground.inputs, ground.from + t - 1, at);
      for (let s = 0; s < draws.length; s++) at[s] = draws[s]?.(at[s]!, stream) ?? at[s]!;
      offsets[t]![k] = scale.to(at[state]!) - centres[k]![t]!;
    }
  });
  // The middle two thirds of the offsets stand for one standard deviation on either side, whatever a few wild paths do.
  return Float64Array.from(offsets, (column) => {
    const sorted = column.filter(Number.isFinite).sort();
    return sorted.length === 0 ? Number.NaN : (quantile(sorted, 0.8413) - quantile(sorted, 0.1587)) / 2;
  });
}
