import type { CompiledRule } from "../../rule/index.js";

/** A normal distribution of the state vector on the fitting scale, moved and narrowed in place. */
export interface StateEstimate {
  /** [slots] */
  readonly mean: Float64Array;
  /** [slots, slots] */
  readonly covariance: Float64Array;
}

/** A rule on the fitting scale, with what a step needs. */
export interface Dynamics {
  readonly compiled: CompiledRule;
  readonly inputs: readonly Float64Array[];
  readonly log: boolean;
  /** How many slots are states, not past values. */
  readonly states: number;
  /** Scratch: [slots], [2 * slots], [2 * slots * (parameters + slots)], twice [slots, slots]. */
  readonly value: Float64Array;
  readonly path: Float64Array;
  readonly sensitivities: Float64Array;
  readonly slopes: Float64Array;
  readonly work: Float64Array;
}

/** The scratch arrays of a filter. */
export function scratch(
  slots: number,
  parameters: number,
): Omit<Dynamics, "compiled" | "inputs" | "log" | "states"> {
  return {
    value: new Float64Array(slots),
    path: new Float64Array(2 * slots),
    sensitivities: new Float64Array(2 * slots * (parameters + slots)),
    slopes: new Float64Array(slots * slots),
    work: new Float64Array(slots * slots),
  };
}

/**
 * Moves the estimate one period on: mean f(m), covariance J C J' + process variance, J being the rule's derivative by the
 * state vector at m. Exact where f is linear on the fitting scale.
 */
export function predict(
  estimate: StateEstimate,
  dynamics: Dynamics,
  parameters: Float64Array,
  period: number,
  processVariance: Float64Array,
): void {
  const { mean, covariance } = estimate;
  const { path, slopes, states, log } = dynamics;
  const slots = mean.length;
  step(estimate, dynamics, parameters, period);
  if (slots === 1) covariance[0] = slopes[0]! * slopes[0]! * covariance[0]! + processVariance[0]!;
  else {
    spreadOut(covariance, slopes, dynamics.work, slots);
    for (let i = 0; i < states; i++)
      covariance[i * slots + i] = covariance[i * slots + i]! + processVariance[i]!;
  }
  for (let i = 0; i < slots; i++) mean[i] = log ? Math.log(path[slots + i]!) : path[slots + i]!;
}

/** Runs the rule one period from the mean, and takes its derivatives by the state vector to the fitting scale. */
function step({ mean }: StateEstimate, dynamics: Dynamics, parameters: Float64Array, period: number): void {
  const { compiled, inputs, log, value, path, sensitivities, slopes } = dynamics;
  const slots = mean.length;
  const width = parameters.length + slots;
  for (let i = 0; i < slots; i++) value[i] = log ? Math.exp(mean[i]!) : mean[i]!;
  compiled.pathWithSensitivities(value, parameters, inputs, period, 1, path, sensitivities);
  for (let i = 0; i < slots; i++) {
    for (let j = 0; j < slots; j++) {
      const raw = sensitivities[(slots + i) * width + parameters.length + j]!;
      slopes[i * slots + j] = log ? (raw * value[j]!) / path[slots + i]! : raw;
    }
  }
}

/** Covariance J C J', in place. */
function spreadOut(covariance: Float64Array, slopes: Float64Array, work: Float64Array, slots: number): void {
  for (let k = 0; k < slots * slots; k++) {
    const i = Math.floor(k / slots);
    const j = k % slots;
    let sum = 0;
    for (let l = 0; l < slots; l++) sum += slopes[i * slots + l]! * covariance[l * slots + j]!;
    work[k] = sum;
  }
  for (let k = 0; k < slots * slots; k++) {
    const i = Math.floor(k / slots);
    const j = k % slots;
    let sum = 0;
    for (let l = 0; l < slots; l++) sum += work[i * slots + l]! * slopes[j * slots + l]!;
    covariance[k] = sum;
  }
}

/** Updates the estimate by a reading of slot i; returns its log-likelihood, given all readings before it. */
export function update(
  { mean, covariance }: StateEstimate,
  { value: column }: Dynamics,
  i: number,
  reading: number,
  variance: number,
): number {
  const slots = mean.length;
  const spread = covariance[i * slots + i]! + variance;
  const innovation = reading - mean[i]!;
  for (let k = 0; k < slots; k++) column[k] = covariance[k * slots + i]!;
  for (let a = 0; a < slots; a++) {
    mean[a] = mean[a]! + (column[a]! * innovation) / spread;
    for (let b = 0; b < slots; b++)
      covariance[a * slots + b] = covariance[a * slots + b]! - (column[a]! * column[b]!) / spread;
  }
  return -0.5 * (Math.log(2 * Math.PI * spread) + (innovation * innovation) / spread);
}
