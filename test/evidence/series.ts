import { type Observations, observations, tableOf } from "../../src/record/index.js";

/** A record of one value `N`, one step a period from 0. */
export function series(values: ArrayLike<number>): Observations {
  const N = Array.from(values);
  const table = tableOf({ period: N.map((_, t) => t), N });
  return observations(table, { period: "period", step: { every: 1, of: "period" }, value: "N" });
}
