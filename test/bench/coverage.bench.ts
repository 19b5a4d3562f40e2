// Coverage of 95% profile intervals over 1,000 simulated records of each design. Held to: trajectory and one-step fits
// 92 to 98%, state-space at least 92%, parameters that a design cannot determine called so in at least 95% of records.
import { bench } from "vitest";
import { coverageOf } from "./coverage.js";
import { designs } from "./coverage-designs.js";

const records = Number(process.env["RECORDS"] ?? 1000);
for (const design of designs) {
  const told = coverageOf(design, records, 20260401).map(({ parameter, covered, width, undetermined }) =>
    parameter === design.undetermined
      ? `${parameter} not determined ${(100 * undetermined).toFixed(1)}%`
      : `${parameter} ${(100 * covered).toFixed(1)}% (median width ${width.toPrecision(3)}${undetermined > 0 ? `, open in ${(100 * undetermined).toFixed(1)}%` : ""})`,
  );
  console.log(`${design.name}: ${told.join("; ")}`);
}

bench("one record of a Beverton-Holt design, simulated and fitted", () => {
  coverageOf(designs[3]!, 1, 1);
});
