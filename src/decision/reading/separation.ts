import type { RandomStream } from "../../numeric/index.js";
import type { SimulatedReadings } from "./simulated-readings.js";

/** How well a reading is expected to tell rival rules apart. */
export interface Separation {
  /** Expected difference of twice the log likelihood between the rule that made the reading and its best rival. */
  readonly evidence: number;
  readonly error: number;
  /** Share of simulated readings that favour their own rule by more than 2. */
  readonly telling: number;
}

/** Simulated readings a candidate and rule. */
const simulated = 300;

/**
 * Expected evidence of a reading at a row: it is simulated under each rule in turn, and its density under every rule is
 * the mean over that rule's drawn parameters.
 *
 * @see Box and Hill (1967), Discrimination among mechanistic models, Technometrics 9:57.
 */
export function separationAt(
  rivals: readonly SimulatedReadings[],
  rows: readonly number[],
  stream: RandomStream,
): Separation {
  const found: number[] = [];
  rivals.forEach((own, r) => {
    for (let j = 0; j < simulated; j++) {
      const truth = Math.floor(stream.uniform() * own.centres.length);
      const scaled = own.centres[truth]![rows[r]!]! + own.scatter[rows[r]!]! * stream.normal();
      const value = own.scale.from(scaled);
      if (!Number.isFinite(value)) continue;
      const densities = rivals.map((rival, i) => logDensity(rival, rows[i]!, value));
      const best = Math.max(...densities.filter((_, i) => i !== r));
      found.push(2 * Math.min(50, densities[r]! - best));
    }
  });
  const evidence = found.reduce((sum, value) => sum + value, 0) / found.length;
  const squares = found.reduce((sum, value) => sum + (value - evidence) ** 2, 0);
  return {
    evidence,
    error: Math.sqrt(squares / (found.length - 1) / found.length),
    telling: found.filter((value) => value > 2).length / found.length,
  };
}

/** Log density of a value on the record's scale. */
function logDensity({ centres, scatter, scale }: SimulatedReadings, row: number, value: number): number {
  if (scale.log && value <= 0) return Number.NEGATIVE_INFINITY;
  const scaled = scale.to(value);
  const sd = scatter[row]!;
  const squares = centres.map((centre) => ((scaled - centre[row]!) / sd) ** 2).filter(Number.isFinite);
  const least = Math.min(...squares);
  const sum = squares.reduce((total, square) => total + Math.exp(-0.5 * (square - least)), 0);
  return Math.log(sum / centres.length) - 0.5 * least - Math.log(sd) - (scale.log ? scaled : 0);
}
