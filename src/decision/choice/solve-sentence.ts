import { isProbability, measuredClause, measuredWords, reachWords } from "../measure/measure.js";
import type { Standing } from "../setting/standing.js";
import { amount, levelWords, plain, rounded } from "../words/amount.js";
import { conditionWords } from "../words/record-words.js";
import type { Solution, Solved, Target } from "./solution.js";

type Question = Omit<Solved, "kind" | "sentence">;

/** The answer in words: what to set, the margin, what it brings about, and on what it stands. */
export function solveSentence(answer: Question, standing: Standing): string {
  const { vary: unknown, solutions } = answer;
  if (answer.everywhere !== undefined) return everyWords(answer, answer.everywhere, standing);
  if (solutions.length === 0) return unsolved(answer, standing);
  const settings = solutions.map((solution) => settingWords(solution, answer)).join(", or ");
  const many = solutions.length > 1 ? `${solutions.length} settings meet the target: ` : "";
  const [first] = solutions;
  const brought = broughtWords(answer.target, first!, standing);
  const chance =
    first!.achievedError > 0 ? ` (Monte-Carlo error ${plain(100 * first!.achievedError, 1)}%)` : "";
  return `${many}With ${unknown} ${settings}, ${brought}${chance}, provided ${conditionWords(standing.rule, standing.fit)}.`;
}

/** A time that is to come no earlier than asked is said by the limit, as it may lie beyond the projection. */
function broughtWords(target: Target, { achieved, achievedError }: Solution, standing: Standing): string {
  if ("time" in target && target.atLeast !== undefined)
    return `${reachWords(target.time, target, standing)} not before ${standing.timeWords(target.atLeast)}`;
  return measuredClause(target, achieved, achievedError, standing);
}

/** Where every setting looked at meets the target. */
function everyWords(
  { vary: unknown, unit, range, measure, target }: Question,
  [least, greatest]: readonly [number, number],
  standing: Standing,
): string {
  const simulated = isProbability(target);
  const said = (value: number): string => {
    if (simulated) return `${plain(100 * value, 3)}%`;
    return Number.isFinite(value) ? measuredWords(target, value, 0, standing) : "never within the projection";
  };
  const same = Number.isFinite(least) ? `${said(least)} throughout` : said(least);
  const span = least === greatest ? same : `from ${said(least)} to ${said(greatest)}`;
  return `Every ${unknown} looked at from ${rangeWords(range, unit)} meets the target: ${measure} is ${span}${simulated ? " (simulated)" : ""}, provided ${conditionWords(standing.rule, standing.fit)}.`;
}

function rangeWords(between: Question["range"], unit: string): string {
  return `${plain(between[0], 4)} to ${amount(plain(between[1], 4), unit)}`;
}

function settingWords(solution: Solution, { unit, level }: Question): string {
  const { margin, value } = solution;
  const side = {
    "this value only": "at",
    "this value and above": "at or above",
    "this value and below": "at or below",
  };
  const spread =
    margin?.lower === undefined || margin.upper === undefined ? undefined : (margin.upper - margin.lower) / 4;
  const digits = solution.value === solution.exact ? limitWords(solution, spread) : plain(value, 12);
  const said = `${side[solution.meets]} ${amount(digits, unit)}`;
  if (spread === undefined || margin === undefined) return said;
  return `${said} (${levelWords(level)} interval ${rounded(margin.lower!, spread)} to ${rounded(margin.upper!, spread)})`;
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

function unsolved(answer: Question, standing: Standing): string {
  const { vary: unknown, unit, range: between, measure, nearest, target } = answer;
  const range = rangeWords(between, unit);
  if (endOfProbability(answer))
    return `No ${unknown} looked at from ${range} brings ${measure} to the target: it is ${100 * nearest.achieved}% throughout (simulated).`;
  const miss = Number.isFinite(nearest.achieved)
    ? `the nearest is ${measuredWords(target, nearest.achieved, 0, standing)} with ${unknown} at ${amount(plain(nearest.value, 4), unit)}`
    : "it is never reached within the projection";
  return `No ${unknown} from ${range} brings ${measure} to the target: ${miss}.`;
}
