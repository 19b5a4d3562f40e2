import { type Fit, problemOf } from "../../estimate/index.js";
import type { Rule } from "../../rule/index.js";
import { isProbability, type Measure, measureWords } from "../measure/measure.js";
import { measureReader } from "../measure/read-measure.js";
import { type Estimated, probabilityReader } from "../measure/read-probability.js";
import {
  refuseBounds,
  refuseNoEffect,
  refuseNoRange,
  refuseNoTarget,
  refusePastAlready,
  refuseProbabilityTarget,
} from "../refusals.js";
import { type Setting, settingOf } from "../setting/set-value.js";
import { settingMargin } from "../setting/setting-margin.js";
import { withUnplanned } from "../setting/setting-range.js";
import { isFit, type Standing, standingOf } from "../setting/standing.js";
import { opened } from "../words/amount.js";
import type { DatedTarget, Solution, Solved, SolveOptions, Target } from "./solution.js";
import { pastAlready, signNotes } from "./solve-notes.js";
import { solveSentence } from "./solve-sentence.js";
import { type Roots, solveWithin } from "./solve-within.js";

/**
 * Finds what a parameter, a first value or the level of an input must be, so that a measure of the projection meets a target.
 *
 * The range is looked over for every crossing, so several solutions, and none, are answers. For a fit each solution
 * has an interval from 400 draws of the parameters, each solved anew; a probability carries the parameters' uncertainty and
 * the random change itself.
 *
 * @param options.vary - its unit is that of the parameter, state or input.
 * @throws {ModelError} `no-such-setting` | `no-effect` | `past-already` | `probability-outside` | `no-range` | `bounds-contradict` | `no-target` |
 *   `future-input-missing` | `outside-projection` | `unknown-name`.
 * @example
 * const loan = recurrence("owed[t+1] = owed*(1 + i) - payment", { fixed: { i: 0.01 } });
 * const asked = solveFor(loan, { vary: "payment", parameters: { payment: 100 }, initial: { owed: 1000 }, periods: 12,
 *   until: { level: "owed", at: 12, is: 0 } });
 * asked.solutions[0].value // 1000*0.01/(1 - 1.01**-12)
 */
export function solveFor(subject: Fit | Rule, options: SolveOptions): Solved {
  const { vary: unknown, level = 0.95 } = options;
  const setting = rangeable(subject, options);
  const standing = standingOf(subject, withUnplanned(subject, options, unknown, setting.between));
  const until = numericTarget(options.until, standing);
  const aim = aimOf(until);
  const found = settingOf(standing, unknown);
  const reader = readerOf(standing, until, found);
  const tolerance = options.multiple === undefined ? 0 : 0.01 * options.multiple;
  const excess = (value: number): number => sidedExcess(until, reader(value).value - aim);
  const [from, to] = setting.between ?? rangeOf(found);
  const roots = solveWithin(excess, from, to, {
    tolerance,
    edge: until.is === undefined,
    // A probability takes a whole run at every place.
    ...(isProbability(until) && { looks: 12 }),
  });
  const everywhere = measuredWhereAllMeet(roots, aim, until);
  const past = pastAlready(standing, until, found);
  if (roots.flat && past !== undefined) throw refusePastAlready(past);
  if (everywhere === undefined && hasNoEffect(roots, aim, until))
    throw refuseNoEffect(unknown, measureWords(until, standing));
  const solutions = roots.roots.map((root) =>
    solutionAt(standing, found, until, root, reader, excess, options),
  );
  const question = {
    vary: unknown,
    unit: standing.unitOf(unknown),
    target: until,
    measure: measureWords(until, standing),
    range: [from, to] as const,
    level,
  };
  const answer = { ...question, solutions, everywhere, nearest: nearestOf(roots, reader) };
  const sentence = [
    solveSentence(answer, standing),
    ...(past === undefined ? [] : [`${opened(past)}.`]),
    ...solutions
      .slice(0, 1)
      .flatMap(({ value, achieved }) => signNotes(standing, found, value, until, achieved)),
  ].join(" ");
  return { kind: "solution", ...answer, sentence };
}

function rangeable(
  subject: Fit | Rule,
  { range: between, vary: unknown }: SolveOptions,
): { between?: readonly [number, number] } {
  if (between === undefined) return {};
  const [from, to] = between;
  const own = isFit(subject) ? subject.rule : subject;
  const bounds = isFit(subject) ? problemOf(subject).bounds(unknown) : own.bounds[unknown];
  if (!(from < to)) throw refuseBounds(unknown, from, to, "the first must be the smaller one");
  if (bounds !== undefined && (to < bounds[0] || from > bounds[1]))
    throw refuseBounds(unknown, from, to, `the rule admits ${bounds[0]} to ${bounds[1]}`);
  return { between };
}

/** The value asked for; of a probability between 0 and 1. */
/** A target whose label of a period is replaced by the time that measures are in. */
function numericTarget(target: Target | DatedTarget, { timeOf }: Standing): Target {
  const key = (["is", "atMost", "atLeast"] as const).find((each) => typeof target[each] === "string");
  // Of the keys of a target only one is set.
  return key === undefined ? (target as Target) : ({ ...target, [key]: timeOf(target[key]!) } as Target);
}

function aimOf(target: Target): number {
  const aim = target.is ?? target.atMost ?? target.atLeast;
  if (aim === undefined || !Number.isFinite(aim)) throw refuseNoTarget(aim);
  if (isProbability(target) && !(aim >= 0 && aim <= 1)) throw refuseProbabilityTarget(aim);
  return aim;
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

type Reader = (value: number) => Estimated;

function readerOf(standing: Standing, measure: Measure, setting: Setting): Reader {
  if (isProbability(measure)) {
    const read = probabilityReader(standing, measure);
    return (value) => read(setting, value);
  }
  const read = measureReader(standing, measure);
  return (value) => ({ value: read(setting.at(value)), error: 0 });
}

/** Above zero where the target is missed; for `is` the plain difference. */
function sidedExcess(target: Target, difference: number): number {
  return target.atLeast === undefined ? difference : -difference;
}

function rangeOf({ name, now, bounds }: Setting): readonly [number, number] {
  if (now === undefined || now === 0 || !Number.isFinite(now)) {
    if (bounds.every(Number.isFinite)) return bounds;
    throw refuseNoRange(name);
  }
  const wide = [now / 100, now * 100].sort((a, b) => a - b) as [number, number];
  return [Math.max(wide[0], bounds[0]), Math.min(wide[1], bounds[1])];
}

function solutionAt(
  standing: Standing,
  setting: Setting,
  target: Target,
  root: number,
  reader: Reader,
  excess: (value: number) => number,
  options: SolveOptions,
): Solution {
  const step = Math.max(Math.abs(root) * 1e-6, 1e-12, options.multiple ?? 0);
  const sided = target.is === undefined;
  const above = sided && excess(root + step) <= 0;
  const value = onMultiple(root, options.multiple, excess, sided ? above : undefined);
  const achieved = reader(value);
  return {
    value,
    exact: root,
    achieved: achieved.value,
    achievedError: achieved.error,
    meets: sided ? (above ? "this value and above" : "this value and below") : "this value only",
    margin: isProbability(target)
      ? undefined
      : settingMargin(standing, setting, target, root, options.level ?? 0.95),
  };
}

/** The multiple nearest to a root that still meets the target; `above` says on which side those lie. */
function onMultiple(
  root: number,
  multiple: number | undefined,
  excess: (value: number) => number,
  above: boolean | undefined,
): number {
  if (multiple === undefined) return root;
  const counted = (count: number): number => Number((count * multiple).toPrecision(15));
  if (above === undefined) return counted(Math.round(root / multiple));
  const outward = above ? 1 : -1;
  let count = above ? Math.floor(root / multiple) : Math.ceil(root / multiple);
  for (let k = 0; k < 3 && excess(counted(count)) > 0; k++) count += outward;
  return counted(count);
}

function nearestOf({ nearest }: Roots, reader: Reader): Solved["nearest"] {
  return { value: nearest.at, achieved: reader(nearest.at).value };
}
