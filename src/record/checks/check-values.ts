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
export function checkValues(series: Omit<CheckedSeries, "logarithms">): void {
  const { values, measured } = series;
  if (values.length < 2) return;
  const logarithms = measured === "level" ? logarithmsOf(values) : undefined;
  const checked = { ...series, logarithms };
  for (const check of checks) check(checked);
}

function logarithmsOf(values: Float64Array): Float64Array | undefined {
  const logarithms = new Float64Array(values.length);
  for (let i = 0; i < values.length; i++) {
    if (!(values[i]! > 0)) return undefined;
    logarithms[i] = Math.log(values[i]!);
  }
  return logarithms;
}
