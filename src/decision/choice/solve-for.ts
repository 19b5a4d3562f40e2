import type { Fit } from "../../estimate/index.js";
import type { Rule } from "../../rule/index.js";
import {
  noEffectError,
  noRangeError,
  noTargetError,
  pastAlreadyError,
  pastTimeError,
  probabilityTargetError,
} from "../errors.js";
import { isProbability } from "../measure/measure.js";
import { measureUnit, measureWords } from "../measure/measure-words.js";
import { type MeasureReader, measureReader, type Reading } from "../measure/read-measure.js";
import { type DecisionContext, decisionContext } from "../setting/decision-context.js";
import { type Setting, settingOf } from "../setting/set-value.js";
import { settingMargin } from "../setting/setting-margin.js";
import { checkedRange, withUnplanned } from "../setting/setting-range.js";
import { opened } from "../words/amount.js";
import type { DatedTarget, Jump, Solution, Solved, SolveOptions, Target } from "./solution.js";
import { pastAlready, readingNotes, stillNotes } from "./solve-notes.js";
import { solveSentence } from "./solve-sentence.js";
import { type Crossing, onMultiple, type Roots, solveWithin } from "./solve-within.js";

/** Places looked at first, and relative width at which the search ends, where every look is a simulation. */
const simulatedLooks = 12;
const simulatedTolerance = 1e-5;

/** To which part of a multiple the setting before rounding is known there. */
const simulatedParts = 64;

/**
 * Finds what a parameter, a first value or the level of an input must be, so that a measure of the projection meets a target.
 *
 * The range is looked over for every crossing, so several solutions, and none, are answers; a jump of the measure over
 * the target is no solution, and its two sides are given. A setting of a fit holds from the record's end. Where chance
 * has a part, every setting meets the same random numbers, and the measure is its mean over the paths (a time its median),
 * the probability, or the `quantile` asked for. For a fit each solution has an interval from 400 draws of the
 * parameters; a probability carries their uncertainty itself.
 *
 * @param options.vary - its unit is that of the parameter, state or input.
 * @throws {ModelError} `no-such-setting` | `no-effect` | `past-already` | `probability-outside` | `no-range` | `range-contradicts` | `no-target` |
 *   `time-past` | `future-input-missing` | `outside-projection` | `unknown-name`.
 * @example
 * const loan = recurrence("owed[t+1] = owed*(1 + i) - payment", { fixed: { i: 0.01 } });
 * const asked = solveFor(loan, { vary: "payment", parameters: { payment: 100 }, initial: { owed: 1000 }, periods: 12,
 *   until: { level: "owed", at: 12, is: 0 } });
 * asked.solutions[0].value // 1000*0.01/(1 - 1.01**-12)
 */
export function solveFor(subject: Fit | Rule, options: SolveOptions): Solved {
  const { vary, level = 0.95, multiple } = options;
  const given = checkedRange(subject, options);
  const context = decisionContext(subject, withUnplanned(subject, options, vary, given));
  const until = numericTarget(options.until, context);
  const aim = aimOf(until);
  const setting = settingOf(context, vary);
  refusePast(until, context, setting);
  const range = given ?? rangeOf(setting);
  const reader = measureReader(context, until);
  const search = searchOf(reader, setting, until, aim);
  const roots = solveWithin(search.excess, range[0], range[1], {
    edge: until.is === undefined,
    multiple: until.is === undefined ? multiple : undefined,
    ...(reader.simulated && { looks: simulatedLooks, tolerance: simulatedTolerance, slack: search.slack }),
  });
  const everywhere = measuredWhereAllMeet(roots, aim, until);
  const past = pastAlready(context, until, setting);
  if (roots.flat && past !== undefined) throw pastAlreadyError(past);
  const measure = measureWords(until, context);
  if (everywhere === undefined && hasNoEffect(roots, aim, until)) throw noEffectError(vary, measure);
  const solutions = roots.roots
    .filter(({ jumps }) => !jumps)
    .map((root) => solutionAt(context, setting, until, root, search, options));
  const answer = {
    vary,
    unit: context.unitOf(vary),
    target: until,
    measure,
    measureUnit: measureUnit(until, context),
    simulated: reader.simulated,
    range,
    multiple,
    level,
    solutions,
    jumps: roots.roots.filter(({ jumps }) => jumps).map((root) => jumpAt(root, search)),
    everywhere,
    nearest: { value: roots.nearest, achieved: search.read(roots.nearest).value },
  };
  const sentence = [
    solveSentence(answer, context),
    ...(past === undefined ? [] : [`${opened(past)}.`]),
    ...(solutions[0] === undefined
      ? stillNotes(context, until, search.read(roots.nearest))
      : readingNotes(context, setting, solutions[0].value, until, search.read(solutions[0].value))),
  ].join(" ");
  return { kind: "solution", ...answer, sentence };
}

/** A target whose label of a period is replaced by the time that measures are in. */
function numericTarget(target: Target | DatedTarget, { timeOf }: DecisionContext): Target {
  const key = (["is", "atMost", "atLeast"] as const).find((each) => typeof target[each] === "string");
  // Of the keys of a target only one is set.
  return key === undefined ? (target as Target) : ({ ...target, [key]: timeOf(target[key]!) } as Target);
}

/** Refuses a time before the present, from which on a setting holds; a first value holds from the start. */
function refusePast(
  target: Target,
  { ground, timeAt, timeWords, axis }: DecisionContext,
  setting: Setting,
): void {
  const aim = aimOf(target);
  const { present, periods } = ground;
  if (!("time" in target) || setting.role === "initial" || aim >= timeAt(present)) return;
  const key = (["is", "atMost", "atLeast"] as const).find((each) => target[each] !== undefined)!;
  const typed = (row: number): string =>
    axis.counts === "numbers" ? `${timeAt(row)}` : JSON.stringify(timeWords(timeAt(row)));
  throw pastTimeError(key, aim, {
    asked: timeWords(aim),
    present: timeWords(timeAt(present)),
    first: timeWords(timeAt(present + 1)),
    last: timeWords(timeAt(periods)),
    ahead: Number.isInteger(aim) && aim >= 1 && aim <= periods - present ? typed(present + aim) : undefined,
    example: typed(periods),
  });
}

/** The value asked for; of a probability between 0 and 1. */
function aimOf(target: Target): number {
  const aim = target.is ?? target.atMost ?? target.atLeast;
  if (aim === undefined || !Number.isFinite(aim)) throw noTargetError(aim);
  if (isProbability(target) && !(aim >= 0 && aim <= 1)) throw probabilityTargetError(aim);
  return aim;
}

/** The measure at settings, each read once, and by how much it misses the target. */
interface Search {
  readonly read: (value: number) => Reading;
  /** Above zero where the target is missed; for `is` the plain difference. */
  readonly excess: (value: number) => number;
  /** Twice the Monte-Carlo error. */
  readonly slack: (value: number) => number;
  readonly simulated: boolean;
}

function searchOf(reader: MeasureReader, setting: Setting, target: Target, aim: number): Search {
  const known = new Map<number, Reading>();
  const read = (value: number): Reading => {
    const found = known.get(value) ?? reader.read({ setting, value });
    known.set(value, found);
    return found;
  };
  return {
    read,
    excess: (value) => sidedExcess(target, read(value).value - aim),
    slack: (value) => 2 * read(value).error,
    simulated: reader.simulated,
  };
}

/** Above zero where the target is missed; for `is` the plain difference. */
function sidedExcess(target: Target, difference: number): number {
  return target.atLeast === undefined ? difference : -difference;
}

/** Smallest and largest measure where no place misses the target. */
function measuredWhereAllMeet({ least, greatest }: Roots, aim: number, target: Target): Solved["everywhere"] {
  if (target.is !== undefined || !(greatest <= 0)) return undefined;
  return target.atLeast === undefined ? [aim + least, aim + greatest] : [aim - greatest, aim - least];
}

/** The same everywhere, and not because it can go no further: a probability of 0% or 100%, a time never reached. */
function hasNoEffect({ flat, least }: Roots, aim: number, target: Target): boolean {
  if (!flat || !Number.isFinite(least)) return false;
  const measure = aim + sidedExcess(target, least);
  return !(isProbability(target) && (measure === 0 || measure === 1));
}

function rangeOf({ name, now, bounds }: Setting): readonly [number, number] {
  if (now === undefined || now === 0 || !Number.isFinite(now)) {
    if (bounds.every(Number.isFinite)) return bounds;
    throw noRangeError(name);
  }
  const wide = [now / 100, now * 100].sort((a, b) => a - b) as [number, number];
  return [Math.max(wide[0], bounds[0]), Math.min(wide[1], bounds[1])];
}

function solutionAt(
  context: DecisionContext,
  setting: Setting,
  target: Target,
  root: Crossing,
  search: Search,
  { level = 0.95, multiple }: SolveOptions,
): Solution {
  const { excess, read } = search;
  const sided = target.is === undefined;
  const above = sided && (root.at === root.below ? excess(root.above) <= 0 : true);
  const value = sided ? root.at : onMultiple(root.at, multiple);
  const exact = sided && multiple !== undefined ? unrounded(root, search) : root.at;
  const { value: achieved, error: achievedError, left } = read(value);
  return {
    value,
    exact,
    achieved,
    achievedError,
    left,
    meets: sided ? (above ? "this value and above" : "this value and below") : "this value only",
    margin: settingMargin(context, setting, target, exact, level),
  };
}

/** Where a target begins to be met between the multiples on either side. */
function unrounded({ at, below, above }: Crossing, { excess, simulated }: Search): number {
  if (below === above) return at;
  const size = Math.max(Math.abs(below), Math.abs(above));
  const tolerance = simulated ? (above - below) / (simulatedParts * size) : 0;
  return solveWithin(excess, below, above, { looks: 2, edge: true, tolerance }).roots[0]?.at ?? at;
}

function jumpAt({ below, above }: Crossing, { read }: Search): Jump {
  return {
    below: { value: below, achieved: read(below).value },
    above: { value: above, achieved: read(above).value },
  };
}
