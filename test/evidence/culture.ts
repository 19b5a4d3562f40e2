import { type Observations, observations, tableOf } from "../../src/record/index.js";

/** An invented culture of 21 half-hourly readings, density without unit, made for checks: fitted by R 4.2 and SciPy. */
export const densities: readonly number[] = [
  0.0195, 0.0244, 0.0343, 0.0463, 0.0592, 0.0771, 0.0982, 0.1168, 0.1598, 0.1956, 0.2579, 0.3187, 0.3767,
  0.4665, 0.5809, 0.6814, 0.7896, 0.8707, 0.9206, 1.0572, 1.1784,
];

/** The first `count` readings as a record. */
export function cultureOf(count: number): Observations {
  const table = tableOf({
    hours: densities.slice(0, count).map((_, i) => i / 2),
    density: densities.slice(0, count),
  });
  return observations(table, { period: "hours", step: { every: 0.5, of: "hour" }, value: "density" });
}

export const culture: Observations = cultureOf(21);
