import type { RandomStream } from "../../numeric/index.js";
import type { Readings } from "../rows/readings.js";
import type { Dynamics } from "./kalman-step.js";

/** A cloud of possible states, moved and resampled in place. */
interface Cloud {
  /** [particles, slots], in the record's own unit, and a copy to draw from. */
  readonly states: Float64Array;
  readonly drawn: Float64Array;
  readonly weights: Float64Array;
  readonly slots: number;
}

/** What particles need to know of a state-space model at its estimates. */
export interface ParticleModel {
  readonly dynamics: Dynamics;
  readonly parameters: Float64Array;
  readonly readings: Readings;
  /** By state, on the fitting scale. */
  readonly processSd: ArrayLike<number>;
  readonly readingSd: ArrayLike<number>;
}

/**
 * Log-likelihood of the readings after the first ones by a bootstrap particle filter, the beginning being the first
 * readings with their own error. It rests on no linearisation, only on the number of particles.
 *
 * @see Gordon, Salmond and Smith (1993), IEE Proceedings F 140:107.
 */
export function particleLikelihood(model: ParticleModel, particles: number, stream: RandomStream): number {
  const { dynamics, readings } = model;
  const slots = readings.beginning.length;
  const cloud: Cloud = {
    states: new Float64Array(particles * slots),
    drawn: new Float64Array(particles * slots),
    weights: new Float64Array(particles),
    slots,
  };
  begin(model, cloud, stream);
  let period = readings.first;
  let sum = 0;
  for (let i = readings.skipped; i < readings.count; i++) {
    for (; period < readings.periods[i]!; period++) move(model, cloud, period, stream);
    const s = readings.states[i]!;
    sum += weigh(cloud, s, readings.values[i]!, model.readingSd[s]! / readings.roots[i]!, dynamics.log);
    resample(cloud, stream);
  }
  return sum;
}

function begin(
  { readings, readingSd, dynamics }: ParticleModel,
  { states, slots }: Cloud,
  stream: RandomStream,
): void {
  const sds = readings.beginningRoots.map((root, slot) => readingSd[readings.slotStates[slot]!]! / root);
  for (let k = 0; k < states.length; k++) {
    const slot = k % slots;
    const value = readings.beginning[slot]! + sds[slot]! * stream.normal();
    states[k] = dynamics.log ? Math.exp(value) : value;
  }
}

function move(model: ParticleModel, { states, slots }: Cloud, period: number, stream: RandomStream): void {
  const { dynamics, parameters, processSd } = model;
  const { value: state, compiled, inputs, log } = dynamics;
  for (let first = 0; first < states.length; first += slots) {
    for (let s = 0; s < slots; s++) state[s] = states[first + s]!;
    compiled.step(state, parameters, inputs, period, state);
    for (let s = 0; s < dynamics.states; s++) {
      const error = processSd[s]! * stream.normal();
      state[s] = log ? state[s]! * Math.exp(error) : state[s]! + error;
    }
    for (let s = 0; s < slots; s++) states[first + s] = state[s]!;
  }
}

/** Weighs every particle by the density of the reading; returns the logarithm of their mean. */
function weigh(
  { states, weights, slots }: Cloud,
  s: number,
  reading: number,
  sd: number,
  log: boolean,
): number {
  let sum = 0;
  for (let p = 0; p < weights.length; p++) {
    const value = states[p * slots + s]!;
    const z = (reading - (log ? Math.log(value) : value)) / sd;
    const density = Math.exp(-0.5 * z * z) / (sd * Math.sqrt(2 * Math.PI));
    weights[p] = Number.isFinite(density) ? density : 0;
    sum += weights[p]!;
  }
  return Math.log(sum / weights.length);
}

/**
 * Draws as many particles by their weights: the total is divided into equal shares, and one place is drawn within each
 * (stratified resampling).
 *
 * @see Kitagawa, G. (1996), Journal of Computational and Graphical Statistics 5:1, for resampling by strata.
 */
function resample({ states, drawn, weights, slots }: Cloud, stream: RandomStream): void {
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const spacing = total / weights.length;
  let reached = weights[0]!;
  let from = 0;
  for (let p = 0; p < weights.length; p++) {
    const wanted = spacing * (p + stream.uniform());
    while (reached < wanted && from < weights.length - 1) reached += weights[++from]!;
    for (let s = 0; s < slots; s++) drawn[p * slots + s] = states[from * slots + s]!;
  }
  states.set(drawn);
}
