import type { Bounds } from "../recurrence-options.js";
import type { NamedQuantity } from "./named-rule.js";

const quantity = (meaning: string, unit: string): NamedQuantity => ({ meaning, unit });

/** Quantities that many rules share, by the letter that the literature uses. */
export const level: NamedQuantity = quantity("level", "level");
export const rate: NamedQuantity = quantity("growth rate a period at low level", "1/period");
export const growth: NamedQuantity = quantity("multiplier a period at low level", "");
export const capacity: NamedQuantity = quantity("level at which it stays", "level");
export const pure = (meaning: string): NamedQuantity => quantity(meaning, "");
export const inLevels = (meaning: string): NamedQuantity => quantity(meaning, "level");
export const perLevel = (meaning: string): NamedQuantity => quantity(meaning, "1/level");
export const other = (meaning: string, unit: string): NamedQuantity => quantity(meaning, unit);

export const positive: readonly [number, number] = [0, Number.POSITIVE_INFINITY];
/** Of a state that the rule takes below 0 only where it no longer holds. */
export const neverNegative: Bounds = { range: positive, atBounds: "error" };
export const aboveOne: readonly [number, number] = [1, Number.POSITIVE_INFINITY];
export const fraction: readonly [number, number] = [0, 1];
