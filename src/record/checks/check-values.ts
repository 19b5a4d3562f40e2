import { belowZero } from "./below-zero.js";
import { bulk } from "./bulk.js";
import { ceiling } from "./ceiling.js";
import type { CheckedSeries } from "./checked-series.js";
import { manyZeros } from "./many-zeros.js";
import { neverChanges } from "./never-changes.js";
import { oddChange } from "./odd-change.js";
import { spike } from "./spike.js";
import { unitJump } from "./unit-jump.js";

const checks = [neverChanges, belowZero, manyZeros, ceiling, unitJump, spike, oddChange, bulk] as const;

/** Looks at one state of one series for what a careful analyst would see. Nothing is altered. */
export function checkValues(series: CheckedSeries): void {
  if (series.values.length > 1) for (const check of checks) check(series);
}
