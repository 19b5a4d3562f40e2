import type { NamedQuantity } from "./named-rule.js";

const quantity = (meaning: string, unit: string): NamedQuantity => ({ meaning, unit });

/** Quantities that many rules share, by the letter that the literature uses. */
export const level: NamedQuantity = quantity("level", "level");
export const rate: NamedQuantity = quantity("growth rate a period at low level", "1/period");
export const growthFactor: NamedQuantity = quantity("multiplier a period at low level", "");
export const carryingCapacity: NamedQuantity = quantity("level at which it stays", "level");
export const dimensionless = (meaning: string): NamedQuantity => quantity(meaning, "");
export const inStateUnit = (meaning: string): NamedQuantity => quantity(meaning, "level");
export const perStateUnit = (meaning: string): NamedQuantity => quantity(meaning, "1/level");
export const quantityWithUnit = (meaning: string, unit: string): NamedQuantity => quantity(meaning, unit);

export const positive: readonly [number, number] = [0, Number.POSITIVE_INFINITY];
export const aboveOne: readonly [number, number] = [1, Number.POSITIVE_INFINITY];
export const fraction: readonly [number, number] = [0, 1];
