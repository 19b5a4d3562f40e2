import type { Fit } from "../../estimate/index.js";
import { type RunHooks, randomStream, ticker } from "../../numeric/index.js";
import { placeOf } from "../../projection/index.js";
import type { PeriodAxis } from "../../record/index.js";
import { noCandidateError, noPurposeError, probabilityAnswerError } from "../errors.js";
import { isProbability, type Measure, placedMeasure } from "../measure/measure.js";
import { measureWords } from "../measure/measure-words.js";
import { pathReader } from "../measure/path-values.js";
import { drawReader } from "../setting/setting-margin.js";
import { narrowingAt } from "./narrowing.js";
import { readingSentence } from "./reading-sentence.js";
import { separationAt } from "./separation.js";
import { type SimulatedReadings, simulatedReadings } from "./simulated-readings.js";

/** Options of `nextReading`. */
export interface NextReadingOptions extends RunHooks {
  /** Periods beyond the record up to which a reading could be taken, and up to which the answer looks. */
  readonly periods: number;
  /**
   * Periods at which it could be taken, by number or label: a list, or two ends; those within the record only
   * where they are given, as for samples that were kept; default every period after the record.
   */
  readonly values?:
    | readonly (number | string)[]
    | {
        /** First period, by number or label. */
        readonly from: number | string;
        /** Last period, by number or label. */
        readonly to: number | string;
      };
  /** Measure whose margin is to be narrowed; needed for a single fit. */
  readonly answer?: Measure;
  /** What is read; default the first state. */
  readonly state?: string;
  /** Readings taken at the same time; they count where the error is one of observation; default 1. */
  readonly replicates?: number;
  /**
   * Cost of a reading at a time, in any unit; the gain is then weighed by it; default the same everywhere.
   */
  readonly cost?: (time: number) => number;
  /** Of a fit or a record with several groups: which one. */
  readonly group?: string;
  /** Parameter values drawn; default 1000. */
  readonly paths?: number;
  /** Seed of the random numbers, a whole number; default that of the case, else 1. */
  readonly seed?: number;
}

/** What a reading at one time would bring. */
export interface ReadingChoice {
  readonly time: number;
  /** Whether the time lies within the record, where only a sample that was kept can still be read. */
  readonly withinRecord: boolean;
  /** Whether the reading comes after the event that the answer is the time of, too late to help before it. */
  readonly tooLate: boolean;
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
  /** The one that is worth most among those that do not come too late; of all where all do. */
  readonly recommended: ReadingChoice;
  /** When the event comes that the answer is the time of, at the estimates; undefined for any other answer. */
  readonly event: number | undefined;
  readonly sentence: string;
}

/**
 * When a further reading would help most: to narrow a named answer, or to tell rival rules apart.
 *
 * Parameters are drawn from each fit, a reading is simulated at each time from one of the draws, and the draws are
 * reweighted by its likelihood under each. Nothing is refitted; the Monte-Carlo error is given with each gain. Readings after
 * the record are looked at, those within it only where their times are given; where the answer is the time of an event,
 * readings after it are marked as too late and not recommended.
 *
 * @param fits - one fit with `answer`, or several fits of the same record.
 * @throws {ModelError} `no-purpose` | `no-candidate` | `unknown-name` | `probability-not-narrowed` | `future-input-missing`.
 * @example nextReading(fitted, { periods: 10, answer: { parameter: "K" } }).purpose // "narrow the answer"
 */
export function nextReading(fits: Fit | readonly Fit[], options: NextReadingOptions): NextReading {
  const all = [fits].flat() as readonly Fit[];
  const [first] = all;
  const { answer, replicates = 1, seed = 1, paths: draws = 1000, periods, cost = () => 1 } = options;
  if (first === undefined || (all.length === 1 && answer === undefined)) throw noPurposeError();
  if (answer !== undefined && isProbability(answer)) throw probabilityAnswerError();
  const state = options.state ?? first.rule.states[0]!;
  const group = options.group === undefined ? {} : { group: options.group };
  const rivals = all.map((fit) =>
    simulatedReadings(fit, { periods, state: placeOf(fit.rule, state), draws, replicates, seed, ...group }),
  );
  const { context } = rivals[0]!;
  const look =
    answer === undefined ? separationLook(rivals, seed) : narrowingLook(rivals[0]!, answer, draws, seed);
  const event = eventTime(rivals[0]!, answer);
  const end = context.timeAt(context.ground.present);
  const times = candidates(rivals, options.values);
  const tick = ticker(options, times.length);
  const choices = times.map(({ time, rows }): ReadingChoice => {
    tick();
    const { gain, error, telling } = look(rows);
    const price = cost(time);
    const late = event !== undefined && time > event;
    return {
      time,
      withinRecord: time <= end,
      tooLate: late,
      gain,
      error,
      telling,
      cost: price,
      worth: gain / price,
    };
  });
  const found = {
    purpose: answer === undefined ? ("tell the rules apart" as const) : ("narrow the answer" as const),
    state,
    replicates,
    axis: context.axis,
    zero: context.zero,
    choices,
    recommended: mostWorth(choices),
    event,
  };
  const about = answer === undefined ? "" : measureWords(answer, context);
  return {
    kind: "next-reading",
    ...found,
    sentence: readingSentence(found, context.timeWords, about, rivals.length),
  };
}

/** The choice that is worth most; one that comes too late only where all do. */
function mostWorth(choices: readonly ReadingChoice[]): ReadingChoice {
  const timely = choices.filter(({ tooLate }) => !tooLate);
  return (timely.length > 0 ? timely : choices).reduce((top, next) => (next.worth > top.worth ? next : top));
}

/** What a reading brings, by its row in every rival's path. */
type Look = (rows: readonly number[]) => {
  readonly gain: number;
  readonly error: number;
  readonly telling: number | undefined;
};

function narrowingLook(readings: SimulatedReadings, answer: Measure, draws: number, seed: number): Look {
  const answers = levelled(drawReader(readings.context, answer, draws, true)());
  return ([row]) => {
    const { share, error } = narrowingAt(readings, answers, row!, randomStream(seed).jump());
    return { gain: 1 - share, error, telling: undefined };
  };
}

/** The time of the event that an answer asks for, on the path at the estimates; undefined for any other answer. */
function eventTime({ context }: SimulatedReadings, answer: Measure | undefined): number | undefined {
  if (answer === undefined || !("time" in answer)) return undefined;
  const { rule, ground } = context;
  const measure = placedMeasure(answer, rule, ground.periods - ground.present);
  return pathReader(context, measure, "estimates")().values[0]!;
}

function separationLook(rivals: readonly SimulatedReadings[], seed: number): Look {
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
  rivals: readonly SimulatedReadings[],
  when: NextReadingOptions["values"],
): readonly { readonly time: number; readonly rows: readonly number[] }[] {
  const { context } = rivals[0]!;
  const process = rivals.some((rival) => rival.context.random);
  const times = Array.from({ length: context.ground.periods + 1 }, (_, row) => context.timeAt(row));
  const wanted = (time: number): boolean => {
    if (when === undefined) return time > context.timeAt(context.ground.present);
    return "from" in when
      ? time >= context.timeOf(when.from) && time <= context.timeOf(when.to)
      : when.some((each) => Math.abs(context.timeOf(each) - time) < 1e-9);
  };
  const found = times.filter(wanted).flatMap((time) => {
    const rows = rivals.map((rival) => rowAt(rival, time));
    const ahead = rows.every((row, i) => row > rivals[i]!.context.ground.present);
    return rows.every((row) => row >= 0) && (ahead || !process) ? [{ time, rows }] : [];
  });
  if (found.length === 0)
    throw noCandidateError(context.timeWords(times[0]!), context.timeWords(times[times.length - 1]!));
  return found;
}

function rowAt({ context }: SimulatedReadings, time: number): number {
  for (let row = 0; row <= context.ground.periods; row++)
    if (Math.abs(context.timeAt(row) - time) < 1e-9) return row;
  return -1;
}
