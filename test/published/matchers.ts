import { expect } from "vitest";
import type { Estimate, Fit } from "../../kernel-helpers/index.js";

/** The estimate of one unknown of a fit's only group. */
export function named(fitted: Fit, name: string): Estimate {
  return fitted.groups[0]!.estimates.find((estimate) => estimate.name === name)!;
}

/** Holds a value to an expected one within a relative tolerance. */
export function near(value: number | undefined, expected: number, tolerance: number): void {
  expect(Math.abs((value ?? Number.NaN) / expected - 1)).toBeLessThan(tolerance);
}
