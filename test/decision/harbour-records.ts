import { type Observations, observations, tableOf } from "../../src/record/index.js";

/** Invented half-hourly densities of one culture, made by a Beverton-Holt rule with 3% reading errors. */
const densities = [
  0.0195, 0.0244, 0.0343, 0.0463, 0.0592, 0.0771, 0.0982, 0.1168, 0.1598, 0.1956, 0.2579, 0.3187, 0.3767,
  0.4665, 0.5809, 0.6814, 0.7896, 0.8707, 0.9206, 1.0572, 1.1784,
];

/** The culture's record, up to a number of readings. */
export function cultureRecord(readings: number = densities.length): Observations {
  const values = densities.slice(0, readings);
  return observations(tableOf({ hours: values.map((_, i) => i / 2), density: values }), {
    period: "hours",
    step: { every: 0.5, of: "hour" },
    value: "density",
  });
}

/** Several flasks whose densities are these, hour by hour. */
export function flaskRecord(flasks: Readonly<Record<string, readonly number[]>>): Observations {
  const rows = Object.entries(flasks).flatMap(([flask, values]) =>
    values.map((density, hour) => ({ flask, hour, density })),
  );
  const table = tableOf({
    flask: rows.map((row) => row.flask),
    hour: rows.map((row) => row.hour),
    density: rows.map((row) => row.density),
  });
  return observations(table, {
    period: "hour",
    step: { every: 1, of: "hour" },
    by: "flask",
    value: "density",
    unit: "10^4 cells/mL",
  });
}
