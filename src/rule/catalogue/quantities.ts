import type { Bounds } from "../recurrence-options.js";
import type { NamedQuantity } from "./named-rule.js";

const quantity = (meaning: string, unit: string): NamedQuantity => ({ meaning, unit });

/** Quantities that many rules share, by the letter that the literature uses. */
export const level: NamedQuantity = quantity("level", "level");
export const rate: NamedQuantity = quantity("intrinsic growth rate per period", "1/period");
export const growthFactor: NamedQuantity = quantity("growth factor per period at low density", "");
export const carryingCapacity: NamedQuantity = quantity("carrying capacity", "level");
export const dimensionless = (meaning: string): NamedQuantity => quantity(meaning, "");
export const inStateUnit = (meaning: string): NamedQuantity => quantity(meaning, "level");
export const perStateUnit = (meaning: string): NamedQuantity => quantity(meaning, "1/level");
export const quantityWithUnit = (meaning: string, unit: string): NamedQuantity => quantity(meaning, unit);

export const positive: readonly [number, number] = [0, Number.POSITIVE_INFINITY];
/** For a state that falls below 0 only where the rule is no longer valid. */
export const neverNegative: Bounds = { range: positive, atBounds: "error" };
export const aboveOne: readonly [number, number] = [1, Number.POSITIVE_INFINITY];
export const fraction: readonly [number, number] = [0, 1];
