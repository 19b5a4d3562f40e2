import { measuredClause, measuredWords } from "../measure/measure.js";
import type { Standing } from "../setting/standing.js";
import { amount, levelWords, plain, rounded } from "../words/amount.js";
import { conditionWords } from "../words/record-words.js";
import type { Solution, Solved } from "./solution.js";

/** The answer in words: what to set, the margin, what it brings about, and on what it stands. */
export function solveSentence(answer: Omit<Solved, "kind" | "sentence">, standing: Standing): string {
  const { unknown, solutions } = answer;
  if (solutions.length === 0) return unsolved(answer, standing);
  const settings = solutions.map((solution) => settingWords(solution, answer)).join(", or ");
  const many = solutions.length > 1 ? `${solutions.length} settings meet the target: ` : "";
  const [first] = solutions;
  const brought = measuredClause(answer.target, first!.achieved, first!.achievedError, standing);
  const chance =
    first!.achievedError > 0 ? ` (Monte-Carlo error ${plain(100 * first!.achievedError, 1)}%)` : "";
  return `${many}With ${unknown} ${settings}, ${brought}${chance}, provided ${conditionWords(standing.rule, standing.fit)}.`;
}

function settingWords(solution: Solution, { unit, level }: Omit<Solved, "kind" | "sentence">): string {
  const { margin, value } = solution;
  const side = {
    "this value only": "at",
    "this value and above": "at or above",
    "this value and below": "at or below",
  };
  const spread =
    margin?.lower === undefined || margin.upper === undefined ? undefined : (margin.upper - margin.lower) / 4;
  const digits = solution.value === solution.exact ? rounded(value, spread) : plain(value, 12);
  const said = `${side[solution.meets]} ${amount(digits, unit)}`;
  if (spread === undefined || margin === undefined) return said;
  return `${said} (${levelWords(level)} interval ${rounded(margin.lower!, spread)} to ${rounded(margin.upper!, spread)})`;
}

function unsolved(answer: Omit<Solved, "kind" | "sentence">, standing: Standing): string {
  const { unknown, unit, between, measure, nearest, target } = answer;
  const range = `${plain(between[0], 4)} to ${amount(plain(between[1], 4), unit)}`;
  const miss = Number.isFinite(nearest.achieved)
    ? `the nearest is ${measuredWords(target, nearest.achieved, 0, standing)} with ${unknown} at ${amount(plain(nearest.value, 4), unit)}`
    : "it is never reached within the projection";
  return `No ${unknown} from ${range} brings ${measure} to the target: ${miss}.`;
}
