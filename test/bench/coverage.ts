import { type Estimate, fit } from "../../src/estimate/index.js";
import { quantile, randomStream } from "../../src/numeric/index.js";
import { type Design, simulated } from "./coverage-designs.js";

/** What the intervals of one parameter did over many records of a design. */
export interface Coverage {
  readonly parameter: string;
  /** Share of records whose 95% profile interval holds the truth; an open side holds everything. */
  readonly covered: number;
  /** Median width; infinite where a side is open. */
  readonly width: number;
  /** Share of records in which the fit called it not determined. */
  readonly undetermined: number;
}

/** Fits `records` simulated records of a design; says for every parameter how its intervals did. */
export function coverageOf(design: Design, records: number, seed: number): readonly Coverage[] {
  const names = Object.keys(design.truth);
  const tallies = names.map(() => ({ covered: 0, undetermined: 0, widths: new Float64Array(records) }));
  let stream = randomStream(seed);
  for (let k = 0; k < records; k++) {
    const fitted = fit(design.rule, simulated(design, stream), design.options);
    stream = stream.jump();
    names.forEach((name, i) => {
      const estimate = fitted.groups[0]!.estimates.find((each) => each.name === name)!;
      const { lower = Number.NEGATIVE_INFINITY, upper = Number.POSITIVE_INFINITY } = limitsOf(estimate);
      const truth = design.truth[name]!;
      const tally = tallies[i]!;
      if (lower <= truth && truth <= upper) tally.covered++;
      if (estimate.standardError === undefined) tally.undetermined++;
      tally.widths[k] = upper - lower;
    });
  }
  return tallies.map(({ covered, undetermined, widths }, i) => ({
    parameter: names[i]!,
    covered: covered / records,
    width: quantile(widths.sort(), 0.5),
    undetermined: undetermined / records,
  }));
}

function limitsOf({ profile }: Estimate): { lower?: number; upper?: number } {
  return {
    ...(profile.lower !== undefined && { lower: profile.lower }),
    ...(profile.upper !== undefined && { upper: profile.upper }),
  };
}
