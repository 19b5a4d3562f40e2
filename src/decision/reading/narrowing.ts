import type { RandomStream } from "../../numeric/index.js";
import type { SimulatedReadings } from "./simulated-readings.js";

/** How much narrower an answer is expected to be after a reading. */
export interface Narrowing {
  /** Expected width of the answer's 80% interval after the reading, as a share of the present one. */
  readonly share: number;
  /** Monte-Carlo error of the share. */
  readonly error: number;
}

/** Simulated readings a candidate. */
const simulated = 200;

/**
 * Expected width of an answer's interval after a reading at a row, by reweighting: each simulated reading, drawn from one draw of
 * the parameters, reweights all draws by its likelihood under each.
 *
 * @param answers - [draws]; on the log scale where all are positive and they spread over more than a factor of three.
 * @see Chaloner and Verdinelli (1995), Bayesian experimental design: a review, Statistical Science 10:273.
 */
export function narrowingAt(
  readings: SimulatedReadings,
  answers: Float64Array,
  row: number,
  stream: RandomStream,
): Narrowing {
  const { centres, scatter } = readings;
  const draws = centres.length;
  const sd = scatter[row]!;
  const order = Int32Array.from(answers.keys()).sort((a, b) => answers[a]! - answers[b]!);
  const equal = new Float64Array(draws).fill(1);
  const present = weightedWidth(answers, order, equal);
  const weights = new Float64Array(draws);
  const widths: number[] = [];
  for (let j = 0; j < simulated; j++) {
    const truth = Math.floor(stream.uniform() * draws);
    const value = centres[truth]![row]! + sd * stream.normal();
    if (!Number.isFinite(value)) continue;
    for (let k = 0; k < draws; k++) {
      const off = (value - centres[k]![row]!) / sd;
      weights[k] = Number.isFinite(off) ? Math.exp(-0.5 * off * off) : 0;
    }
    widths.push(weightedWidth(answers, order, weights) / present);
  }
  const share = widths.reduce((sum, width) => sum + width, 0) / widths.length;
  const squares = widths.reduce((sum, width) => sum + (width - share) ** 2, 0);
  return { share, error: Math.sqrt(squares / (widths.length - 1) / widths.length) };
}

/** Width between the weighted tenth and ninetieth percentiles. */
function weightedWidth(answers: Float64Array, order: Int32Array, weights: Float64Array): number {
  let total = 0;
  for (let k = 0; k < weights.length; k++) total += weights[k]!;
  let sum = 0;
  let low = Number.NaN;
  let before = answers[order[0]!]!;
  for (const k of order) {
    const next = sum + weights[k]!;
    if (Number.isNaN(low) && next >= 0.1 * total)
      low = between(before, answers[k]!, (0.1 * total - sum) / weights[k]!);
    if (next >= 0.9 * total) return between(before, answers[k]!, (0.9 * total - sum) / weights[k]!) - low;
    sum = next;
    if (weights[k]! > 0) before = answers[k]!;
  }
  return 0;
}

function between(from: number, to: number, share: number): number {
  return from + share * (to - from);
}
