// Held to, warm: profiles of 3 parameters and a recovery check of 200 refits on 40 observations in under 25 ms for a
// trajectory or one-step fit, under 1 s for a state-space fit (its profiles and 200 refits).
import { bench } from "vitest";
import { bootstrap, type FitOptions, fit } from "../../src/estimate/index.js";
import { recovery } from "../../src/evidence/check/recovery.js";
import { randomStream } from "../../src/numeric/index.js";
import { type Design, designs, simulated } from "./coverage-designs.js";

const design = designs.find(({ name }) => name === "Beverton-Holt, 40 readings, 10%")!;
const wandering = designs.find(({ name }) => name.startsWith("state-space, Gompertz"))!;
const wanderingRecord = simulated(wandering, randomStream(3));

/** The least of several timings, in milliseconds. */
function leastMilliseconds(work: () => void, rounds: number): number {
  let least = Number.POSITIVE_INFINITY;
  for (let round = 0; round < rounds; round++) {
    const from = performance.now();
    work();
    least = Math.min(least, performance.now() - from);
  }
  return least;
}

function profilesAndRecovery(made: Design, options: FitOptions): () => void {
  const record = simulated(made, randomStream(1));
  return () => {
    const fitted = fit(made.rule, record, options);
    recovery(fitted, fitted.groups[0]!, 200, randomStream(2));
  };
}

/** Profiles, and 200 records drawn from the fit and searched anew. */
function stateSpaceRefits(): void {
  bootstrap(fit(wandering.rule, wanderingRecord, wandering.options), { resamples: 200 });
}

const trajectory = profilesAndRecovery(design, design.options);
const oneStep = profilesAndRecovery(design, { errors: "process", distribution: "lognormal" });
const told: readonly (readonly [string, () => void, number, number])[] = [
  ["trajectory fit", trajectory, 20, 25],
  ["one-step fit", oneStep, 20, 25],
  ["state-space fit", stateSpaceRefits, 3, 1000],
];
for (const [name, work, rounds, limit] of told)
  console.log(
    `${name}: profiles and 200 refits in ${leastMilliseconds(work, rounds).toFixed(1)} ms (held to ${limit} ms)`,
  );

bench("profiles and 200 refits of a trajectory fit", trajectory);
