import { isProbability, type Measure } from "../measure/measure.js";
import { errorWords, measuredClause, measuredWords, reachWords } from "../measure/measure-words.js";
import type { DecisionContext } from "../setting/decision-context.js";
import { amount, percentWords, plain, rounded } from "../words/amount.js";
import { conditionWords } from "../words/record-words.js";
import type { Jump, Solution, Solved, Target } from "./solution.js";
import { leftWords } from "./solve-notes.js";

type Question = Omit<Solved, "kind" | "sentence">;

/** The answer in words: what to set, the margin, what it brings about, and on what it stands. */
export function solveSentence(answer: Question, context: DecisionContext): string {
  const { vary, solutions, jumps } = answer;
  if (answer.everywhere !== undefined) return everyWords(answer, answer.everywhere, context);
  if (solutions.length === 0)
    return jumps.length === 0 ? unsolved(answer, context) : `${jumpWords(answer, context)}.`;
  const settings = solutions.map((solution) => settingWords(solution, answer)).join(", or ");
  const many = solutions.length > 1 ? `${solutions.length} settings meet the target: ` : "";
  const first = solutions[0]!;
  const brought = broughtWords(answer.target, first, context);
  const chance =
    first.achievedError > 0
      ? ` (Monte-Carlo error ${errorWords(answer.target, first.achievedError, context)})`
      : "";
  const jumped = jumps.length === 0 ? "" : ` ${jumpWords(answer, context)}.`;
  return `${many}With ${vary} ${settings}, ${brought}${chance}, provided ${conditionWords(context.rule, context.fit)}.${jumped}${leftWords(first.left, context.paths)}`;
}

/** A time that is to come no earlier than asked is said by the limit, as it may lie beyond the projection. */
function broughtWords(
  target: Target,
  { achieved, achievedError }: Solution,
  context: DecisionContext,
): string {
  if ("time" in target && target.atLeast !== undefined && !context.random)
    return `${reachWords(target.time, target, context)} not before ${context.timeWords(target.atLeast)}`;
  return measuredClause(target, achieved, achievedError, context);
}

/** Where the measure jumps over the target: what it is on either side. */
function jumpWords({ vary, unit, measure, target, jumps }: Question, context: DecisionContext): string {
  const side = ({ value, achieved }: Jump["below"], where: string): string =>
    `${measuredWords(target, achieved, 0, context)} with ${vary} ${where} ${amount(plain(value, 6), unit)}`;
  const each = jumps.map(({ below, above }) => {
    const close = plain(below.value, 6) === plain(above.value, 6);
    return `from ${side(below, close ? "just below" : "at")} to ${side(above, close ? "from" : "at")}`;
  });
  const aim = measuredWords(target as Measure, target.is!, 0, context);
  return `No ${vary} meets the target exactly there: ${measure} jumps over ${aim}, ${each.join(", and ")}`;
}

/** Where every setting looked at meets the target. */
function everyWords(
  { vary, unit, range, measure, target, simulated }: Question,
  [least, greatest]: readonly [number, number],
  context: DecisionContext,
): string {
  const said = (value: number): string =>
    isProbability(target) ? `${plain(100 * value, 3)}%` : measuredWords(target, value, 0, context);
  const span =
    least !== greatest
      ? `from ${said(least)} to ${said(greatest)}`
      : `${said(least)}${Number.isFinite(least) ? " throughout" : ""}`;
  return `Every ${vary} looked at from ${rangeWords(range, unit)} meets the target: ${measure} is ${span}${simulated ? " (simulated)" : ""}, provided ${conditionWords(context.rule, context.fit)}.`;
}

function rangeWords(between: Question["range"], unit: string): string {
  return `${plain(between[0], 4)} to ${amount(plain(between[1], 4), unit)}`;
}

function settingWords(solution: Solution, { unit, level, multiple }: Question): string {
  const { margin, value } = solution;
  const side = {
    "this value only": "at",
    "this value and above": "at or above",
    "this value and below": "at or below",
  };
  const spread =
    margin?.lower === undefined || margin.upper === undefined ? undefined : (margin.upper - margin.lower) / 4;
  const digits = multiple === undefined ? limitWords(solution, spread) : plain(value, 12);
  const said = `${side[solution.meets]} ${amount(digits, unit)}`;
  if (spread === undefined || margin === undefined) return said;
  const before = multiple === undefined ? "" : `before rounding ${rounded(solution.exact, spread)}, `;
  return `${said} (${before}${percentWords(level)} interval ${rounded(margin.lower!, spread)} to ${rounded(margin.upper!, spread)})`;
}

/** A limit rounded to the side that meets the target. */
function limitWords({ value, meets }: Solution, spread: number | undefined): string {
  const said = rounded(value, spread);
  const over = Number(said) - value;
  const outward = meets === "this value and above" ? 1 : -1;
  // A difference in the last digits that a search leaves is none.
  if (meets === "this value only" || over * outward >= -1e-9 * Math.abs(value)) return said;
  const size = spread === undefined || !(spread > 0) ? Math.abs(value) * 1e-2 : spread;
  const unit = 10 ** (Math.floor(Math.log10(size)) - 1);
  return rounded(Number(said) + outward * unit, spread);
}

/** Whether even the nearest miss is a probability that can lie no further off. */
function endOfProbability({ target, nearest }: Question): boolean {
  return isProbability(target) && nearest.achieved === (target.atMost === undefined ? 0 : 1);
}

function unsolved(answer: Question, context: DecisionContext): string {
  const { vary, unit, range: between, measure, nearest, target } = answer;
  const range = rangeWords(between, unit);
  if (endOfProbability(answer))
    return `No ${vary} looked at from ${range} brings ${measure} to the target: it is ${100 * nearest.achieved}% throughout (simulated).`;
  const miss = Number.isFinite(nearest.achieved)
    ? `the nearest is ${measuredWords(target, nearest.achieved, 0, context)} with ${vary} at ${amount(plain(nearest.value, 4), unit)}`
    : "it is never reached within the projection";
  return `No ${vary} from ${range} brings ${measure} to the target: ${miss}.`;
}
