/** The log-likelihood of an extended filter beside that of particles, which rest on no linearisation. */
export interface ParticleCheck {
  readonly filter: number;
  /** Mean and standard deviation over the runs; undefined where fewer than two of them came to anything. */
  readonly particles: number | undefined;
  readonly deviation: number | undefined;
  /** Runs in which no particle came near some reading, of all runs. */
  readonly lost: number;
  readonly of: number;
}

/** What a state-space fit knows beside its estimates. */
export interface Filtered {
  /** Standard deviations of one step and of one reading, by state, on the fitting scale. */
  readonly processError: Readonly<Record<string, number>>;
  readonly observationError: Readonly<Record<string, number>>;
  /** How the first value was taken: from the rule's long-run distribution, as it was read, or as `initial` gives it. */
  readonly start: "stationary" | "diffuse" | "known";
  /** Exact where the rule is linear on the fitting scale; otherwise the rule's slope is taken at the estimated state. */
  readonly method: "exact" | "extended";
  /** Of an extended filter. */
  readonly check?: ParticleCheck;
  /** State vector at the last recorded period, on the fitting scale: mean [slots] and covariance [slots, slots]. */
  readonly last: { readonly mean: readonly number[]; readonly covariance: readonly number[] };
}
