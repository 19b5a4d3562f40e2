import type { Interval } from "../../rule/index.js";
import { strangeName, unreadableOption } from "../refusals.js";
import { type HeldStep, settled } from "./held-step.js";

/** Lowest and highest value to look at: for a rule of one state a pair, otherwise by state. */
export type SearchRange = Interval | Readonly<Record<string, Interval>>;

const isPair = (range: SearchRange): range is Interval => Array.isArray(range);

/**
 * The farthest place at which a rule of one state turns from rising to falling or back, looked for among powers of ten:
 * an equilibrium, or a jump over the line of no change, lies just before it. 0 where it turns nowhere, or only by the
 * rounding of its values.
 */
function farthestTurn(held: HeldStep): number {
  const next = new Float64Array(held.width);
  const directionAt = (x: number): number => {
    held.step(settled(held.rule, [x]), next);
    const change = (next[0]! - x) / x;
    return Math.abs(change) > 1e-12 && Number.isFinite(change) ? Math.sign(change) : 0;
  };
  let farthest = 0;
  for (const side of [1, -1]) {
    let before = 0;
    for (let k = -400; k <= 240; k++) {
      const x = side * 10 ** (k / 4);
      const direction = directionAt(x);
      if (direction * before < 0) farthest = Math.max(farthest, Math.abs(x));
      before = direction || before;
    }
  }
  return farthest;
}

/**
 * Where nothing else is said: a million times the largest parameter, or ten times the place where a rule of one state
 * last turns; of systems, whose turns cannot be looked for so, a million times the reciprocal of the smallest too.
 */
function farthest(held: HeldStep): number {
  const sizes = Array.from(held.parameters, Math.abs);
  const largest = Math.max(1, ...sizes);
  if (held.rule.states.length === 1) return Math.max(1e6 * largest, 10 * farthestTurn(held));
  return 1e6 * Math.max(largest, ...sizes.map((size) => (size > 0 ? 1 / size : 1)));
}

/** The range of each state: as given, else within the rule's bounds, else wide. */
export function searchRanges(held: HeldStep, within: SearchRange | undefined): readonly Interval[] {
  const { rule } = held;
  const given = within === undefined ? {} : isPair(within) ? { [rule.states[0]!]: within } : within;
  for (const name of Object.keys(given)) {
    if (!rule.states.includes(name)) throw strangeName("state", name, rule.states);
  }
  const far = farthest(held);
  return rule.states.map((state) => {
    const range = given[state];
    if (range !== undefined && !(range[0] < range[1] && Number.isFinite(range[1] - range[0]))) {
      throw unreadableOption("within", "two finite numbers, lowest first", JSON.stringify(range));
    }
    const [low, high] = range ?? rule.bounds[state] ?? [-far, far];
    return [Math.max(low, -far), Math.min(high, far)];
  });
}
