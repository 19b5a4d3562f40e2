import type { Fit } from "../../estimate/index.js";
import { randomStream } from "../../numeric/index.js";
import type { PeriodAxis } from "../../record/index.js";
import { isProbability, type Measure, measureWords } from "../measure/measure.js";
import { measureReader } from "../measure/read-measure.js";
import {
  refuseNoCandidate,
  refuseNoPurpose,
  refuseProbabilityObjective,
  refuseStateUnknown,
} from "../refusals.js";
import { percent, plain } from "../words/amount.js";
import { type ImaginedReadings, imaginedReadings } from "./imagined-readings.js";
import { narrowingAt } from "./narrowing.js";
import { separationAt } from "./separation.js";

/** Options of `nextReading`. */
export interface NextReadingOptions {
  /** Periods beyond the record up to which a reading could be taken, and up to which the answer looks. */
  readonly periods: number;
  /** Periods at which it could be taken, by number or label; default every period from the first on. */
  readonly values?:
    | readonly (number | string)[]
    | { readonly from: number | string; readonly to: number | string };
  /** The answer whose margin is to be narrowed; needed for a single fit. */
  readonly answer?: Measure;
  /** What is read; default the first state. */
  readonly state?: string;
  /** Readings taken at the same time; default 1. They count where the error is one of reading. */
  readonly replicates?: number;
  /** Cost of a reading at a time, in any unit; the gain is then weighed by it. Default the same everywhere. */
  readonly cost?: (time: number) => number;
  /** Of fits with several groups: which one. */
  readonly group?: string;
  /** Drawn parameters; default 1000. */
  readonly paths?: number;
  /** Default 1. */
  readonly seed?: number;
}

/** What a reading at one time would bring. */
export interface ReadingChoice {
  readonly time: number;
  /** Share by which the answer's 80% interval is expected to narrow; or the expected evidence between rivals. */
  readonly gain: number;
  readonly error: number;
  /** Between rivals: share of readings that favour their own rule by more than 2 units of twice the log likelihood. */
  readonly telling: number | undefined;
  readonly cost: number;
  /** The gain for one unit of cost. */
  readonly worth: number;
}

/** Which further reading helps most. */
export interface NextReading {
  readonly kind: "next-reading";
  readonly purpose: "narrow the answer" | "tell the rules apart";
  readonly state: string;
  readonly replicates: number;
  readonly axis: PeriodAxis;
  /** Time of period 0 of the axis. */
  readonly zero: number;
  /** By time. */
  readonly choices: readonly ReadingChoice[];
  readonly recommended: ReadingChoice;
  readonly sentence: string;
}

/**
 * When a further reading would help most: to narrow a named answer, or to tell rival rules apart.
 *
 * Parameters are drawn from each fit, a reading is imagined at each time from one of the draws, and the draws are
 * weighed by how well they foretell it. Nothing is refitted; the Monte-Carlo error is given with each gain.
 *
 * @param fits - one fit with `answer`, or several fits of the same record.
 * @throws {ModelError} `no-purpose` | `no-candidate` | `unknown-state` | `probability-not-smooth` | `future-input-missing`.
 * @example nextReading(fitted, { periods: 10, answer: { parameter: "K" } }).purpose // "narrow the answer"
 */
export function nextReading(fits: Fit | readonly Fit[], options: NextReadingOptions): NextReading {
  const all = [fits].flat() as readonly Fit[];
  const [first] = all;
  const { answer, replicates = 1, seed = 1, paths: draws = 1000, periods, cost = () => 1 } = options;
  if (first === undefined || (all.length === 1 && answer === undefined)) throw refuseNoPurpose();
  if (answer !== undefined && isProbability(answer)) throw refuseProbabilityObjective();
  const state = options.state ?? first.rule.states[0]!;
  const group = options.group === undefined ? {} : { group: options.group };
  const rivals = all.map((fit) => {
    const place = fit.rule.states.indexOf(state);
    if (place < 0) throw refuseStateUnknown(state, fit.rule.states);
    return imaginedReadings(fit, { periods, state: place, draws, replicates, seed, ...group });
  });
  const separating = answer === undefined;
  const look = separating ? separationLook(rivals, seed) : narrowingLook(rivals[0]!, answer, seed);
  const choices = candidates(rivals, options.values).map(({ time, rows }): ReadingChoice => {
    const { gain, error, telling } = look(rows);
    const price = cost(time);
    return { time, gain, error, telling, cost: price, worth: gain / price };
  });
  const best = choices.reduce((top, next) => (next.worth > top.worth ? next : top));
  const { standing } = rivals[0]!;
  const found = {
    purpose: separating ? ("tell the rules apart" as const) : ("narrow the answer" as const),
    state,
    replicates,
    axis: standing.axis,
    zero: standing.zero,
    choices,
    recommended: best,
  };
  const about = separating ? "" : measureWords(answer, standing);
  return {
    kind: "next-reading",
    ...found,
    sentence: sentenceOf(found, standing.timeWords(best.time), about, rivals.length),
  };
}

/** What a reading brings, by its row in every rival's path. */
type Look = (rows: readonly number[]) => {
  readonly gain: number;
  readonly error: number;
  readonly telling: number | undefined;
};

function narrowingLook(readings: ImaginedReadings, answer: Measure, seed: number): Look {
  const read = measureReader(readings.standing, answer);
  const answers = levelled(Float64Array.from(readings.grounds, read));
  return ([row]) => {
    const { share, error } = narrowingAt(readings, answers, row!, randomStream(seed).jump());
    return { gain: 1 - share, error, telling: undefined };
  };
}

function separationLook(rivals: readonly ImaginedReadings[], seed: number): Look {
  return (rows) => {
    const { evidence, error, telling } = separationAt(rivals, rows, randomStream(seed).jump());
    return { gain: evidence, error, telling };
  };
}

/** Answers on the log scale where they are positive and spread widely; a time that is never reached stands last. */
function levelled(answers: Float64Array): Float64Array {
  const finite = answers.filter(Number.isFinite).sort();
  const largest = finite[finite.length - 1] ?? 1;
  const capped = answers.map((value) => (Number.isFinite(value) ? value : 2 * largest));
  const low = finite[Math.floor(0.1 * finite.length)] ?? 0;
  const high = finite[Math.floor(0.9 * finite.length)] ?? 0;
  return finite[0]! > 0 && high > 3 * low ? capped.map(Math.log) : capped;
}

/** Times with their rows in every rival's path, where all of them have one. */
function candidates(
  rivals: readonly ImaginedReadings[],
  when: NextReadingOptions["values"],
): readonly { readonly time: number; readonly rows: readonly number[] }[] {
  const { standing } = rivals[0]!;
  const process = rivals.some(({ standing: { change } }) => change.some((noise) => noise !== undefined));
  const times = Array.from({ length: standing.ground.periods + 1 }, (_, row) => standing.timeAt(row));
  const wanted = (time: number): boolean => {
    if (when === undefined) return true;
    return "from" in when
      ? time >= standing.timeOf(when.from) && time <= standing.timeOf(when.to)
      : when.some((each) => Math.abs(standing.timeOf(each) - time) < 1e-9);
  };
  const found = times.filter(wanted).flatMap((time) => {
    const rows = rivals.map((rival) => rowAt(rival, time));
    const ahead = rows.every((row, i) => row > rivals[i]!.standing.present);
    return rows.every((row) => row >= 0) && (ahead || !process) ? [{ time, rows }] : [];
  });
  if (found.length === 0)
    throw refuseNoCandidate(standing.timeWords(times[0]!), standing.timeWords(times[times.length - 1]!));
  return found;
}

function rowAt({ standing }: ImaginedReadings, time: number): number {
  for (let row = 0; row <= standing.ground.periods; row++)
    if (Math.abs(standing.timeAt(row) - time) < 1e-9) return row;
  return -1;
}

function sentenceOf(
  found: Omit<NextReading, "kind" | "sentence">,
  time: string,
  about: string,
  rules: number,
): string {
  const { recommended: best, replicates, state, purpose, choices } = found;
  const what = replicates === 1 ? `A reading of ${state}` : `${replicates} readings of ${state}`;
  const at = `at ${time}`;
  const among = `of the ${choices.length} times looked at`;
  const error = `Monte-Carlo error ${percent(best.error, best.error / 3)}`;
  if (purpose === "narrow the answer")
    return `${what} ${at} helps most ${among}: it is expected to narrow the margin of ${about} by ${percent(best.gain, best.error)} (${error}), if the rule holds.`;
  return `${what} ${at} tells the ${rules} rules apart best ${among}: evidence of ${plain(best.gain, 2)} units is expected (Monte-Carlo error ${plain(best.error, 1)}), and ${percent(best.telling!, 0.01)} of such readings would favour the right rule by more than 2.`;
}
