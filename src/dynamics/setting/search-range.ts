import type { Interval, Rule } from "../../rule/index.js";
import { strangeName, unreadableOption } from "../refusals.js";

/** Lowest and highest value to look at: for a rule of one state a pair, otherwise by state. */
export type SearchRange = Interval | Readonly<Record<string, Interval>>;

const isPair = (range: SearchRange): range is Interval => Array.isArray(range);

/** Where nothing else is said, a million times the largest parameter either way. */
const farthest = (parameters: Float64Array): number =>
  1e6 * parameters.reduce((most, value) => Math.max(most, Math.abs(value)), 1);

/** The range of each state: as given, else within the rule's bounds, else wide. */
export function searchRanges(
  rule: Rule,
  parameters: Float64Array,
  within: SearchRange | undefined,
): readonly Interval[] {
  const given = within === undefined ? {} : isPair(within) ? { [rule.states[0]!]: within } : within;
  for (const name of Object.keys(given)) {
    if (!rule.states.includes(name)) throw strangeName("state", name, rule.states);
  }
  const far = farthest(parameters);
  return rule.states.map((state) => {
    const range = given[state];
    if (range !== undefined && !(range[0] < range[1] && Number.isFinite(range[1] - range[0]))) {
      throw unreadableOption("within", "two finite numbers, lowest first", JSON.stringify(range));
    }
    const [low, high] = range ?? rule.bounds[state] ?? [-far, far];
    return [Math.max(low, -far), Math.min(high, far)];
  });
}
