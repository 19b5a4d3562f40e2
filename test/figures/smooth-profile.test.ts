import { describe, expect, test } from "vitest";
import type { ProfileCurve } from "../../kernel-helpers/figures/index.js";
import { smoothProfile } from "../../kernel-helpers/figures/smooth-profile.js";

const parabola: ProfileCurve = {
  parameter: "r",
  unit: "",
  values: [-2, -1, 0, 1, 2],
  increase: [4, 1, 0, 1, 4],
  estimate: 0,
  lower: -1.9,
  upper: 1.9,
};

describe("smoothProfile", () => {
  test("draws the parabola of a linear parameter exactly from five points", () => {
    // Source: in a linear least-squares problem the profile is a parabola (Bates and Watts 1988, section 6.1).
    const { x, y } = smoothProfile(parabola, 10);
    expect(x.length).toBeGreaterThan(40);
    x.forEach((at, i) => {
      expect(y[i]).toBeCloseTo(at * at, 12);
    });
  });

  test("stops at the maximum increase", () => {
    expect(Math.max(...smoothProfile(parabola, 2).y)).toBeLessThanOrEqual(2);
  });

  test("does not extend an open side to the end of the search", () => {
    const far = {
      ...parabola,
      held: [-2, -1, 0, 1, 2, 1e9],
      worsening: [4, 1, 0, 0.5, 0.7, 0.9],
      upper: undefined,
    };
    expect(Math.max(...smoothProfile(far, 10).x)).toBeLessThan(10);
  });
});
