import type { ProcessNoise, Rule } from "../rule/index.js";
import { missingValue, strangeName, unreadableOption } from "./refusals.js";

/** Random change of one state, ready to apply. */
export interface NoiseTerm {
  readonly slot: number;
  readonly kind: ProcessNoise["kind"];
  readonly sd: number;
}

/** The random change of each state that has one, with standard deviations read from the constants where named. */
export function noiseTerms(
  rule: Rule,
  noise: Readonly<Record<string, ProcessNoise>>,
  constants: Float64Array,
): readonly NoiseTerm[] {
  return Object.entries(noise).map(([state, { kind, sd }]) => {
    const slot = rule.states.indexOf(state);
    if (slot < 0) throw strangeName("state", state, rule.states);
    const value = typeof sd === "number" ? sd : constants[rule.constants.indexOf(sd)];
    if (value === undefined) throw missingValue("standard deviation", String(sd), rule.constants);
    if (!(value >= 0 && Number.isFinite(value)))
      throw unreadableOption("noise", "a standard deviation from 0", value);
    return { slot, kind, sd: value };
  });
}

/** A value after its random change; a lognormal factor has mean 1. */
export const withNoise = (value: number, { kind, sd }: NoiseTerm, normal: number): number =>
  kind === "additive" ? value + sd * normal : value * Math.exp(sd * normal - 0.5 * sd * sd);
