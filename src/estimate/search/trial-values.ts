import { randomStream } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import type { Unknowns } from "../unknowns/unknowns.js";

/**
 * Points at which a search may be begun, from values of the record's own scale: every combination when they are few,
 * a seeded sample of them when they are many.
 *
 * @param most - how many points at most.
 */
export function trialPoints(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
  most: number,
): readonly Float64Array[] {
  const scales = scalesOf(rule, group);
  const choices = unknowns.names.map((name, i) => {
    const given = options.start?.[name] ?? rule.start[name];
    if (given !== undefined) return [given];
    const low = unknowns.lower[i]!;
    const high = unknowns.upper[i]!;
    const inside = scales.filter((value) => value >= low && value <= high);
    const middle = boundedMiddle(low, high);
    return inside.length > 0 && !Number.isFinite(high - low)
      ? inside
      : [...inside, middle, ...quarters(low, high)];
  });
  const total = choices.reduce((product, values) => product * values.length, 1);
  if (total <= most) return everyCombination(choices, total);
  const stream = randomStream(1);
  return Array.from({ length: most }, () =>
    Float64Array.from(choices, (values) => values[Math.floor(stream.uniform() * values.length)]!),
  );
}

function everyCombination(choices: readonly (readonly number[])[], total: number): Float64Array[] {
  return Array.from({ length: total }, (_, number) => {
    let rest = number;
    return Float64Array.from(choices, (values) => {
      const value = values[rest % values.length]!;
      rest = Math.floor(rest / values.length);
      return value;
    });
  });
}

/** Values that parameters of plain rules tend to have: pure numbers, levels, changes and inverses of levels. */
function scalesOf(rule: Rule, group: ObservedGroup): readonly number[] {
  const pure = [0.02, 0.1, 0.3, 0.6, 0.9, 1.2, 2, 4, -0.1, -0.5, -1];
  const states = rule.states.flatMap((state) => levelScales(group.values[state]!));
  const inputs = rule.inputs.flatMap((input) => levelScales(group.inputs[input] ?? new Float64Array(0)));
  const own = [...states, ...inputs.flatMap((value) => [value, 10 * value])];
  return [...new Set([...pure, ...own.filter((value) => Number.isFinite(value) && value !== 0)])];
}

function levelScales(column: Float64Array): number[] {
  const values = column.filter((value) => Number.isFinite(value));
  const size = values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  const middle = values.slice().sort()[values.length >> 1] ?? size;
  const change = (values[values.length - 1]! - values[0]!) / Math.max(1, values.length - 1);
  return [size, 1.3 * size, 3 * size, middle, 0.1 * size, change, -change, 1 / size, 0.1 / size, -1 / size];
}

function quarters(low: number, high: number): number[] {
  return Number.isFinite(high - low)
    ? [low + (high - low) / 10, low + (high - low) / 4, high - (high - low) / 4]
    : [];
}

function boundedMiddle(lower: number, upper: number): number {
  if (Number.isFinite(lower) && Number.isFinite(upper)) return (lower + upper) / 2;
  if (Number.isFinite(lower)) return lower + Math.max(1, Math.abs(lower)) / 2;
  return Number.isFinite(upper) ? upper - Math.max(1, Math.abs(upper)) / 2 : 1;
}
