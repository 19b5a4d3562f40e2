/**
 * A rule as functions over typed arrays. Order everywhere: states, parameters and inputs as in the Rule.
 *
 * `inputs` holds one column an input, indexed by absolute period; `from` is the absolute period of the
 * initial state, so `t` in the rule's text is `from` in the first step. A value that leaves the finite range is
 * written as it is (NaN or infinite), and so is the rest of the path: callers check.
 */
export interface CompiledRule {
  /** One period. Reads state [states], parameters [parameters]; writes next [states] (may be the same array). */
  readonly step: (
    state: Float64Array,
    parameters: Float64Array,
    inputs: readonly Float64Array[],
    t: number,
    next: Float64Array,
  ) => void;
  /** A whole path. values [periods + 1, states], the initial state in row 0. */
  readonly path: (
    initial: Float64Array,
    parameters: Float64Array,
    inputs: readonly Float64Array[],
    from: number,
    periods: number,
    values: Float64Array,
  ) => void;
  /**
   * A whole path with exact sensitivities in the same pass.
   * values [periods + 1, states]; sensitivities [periods + 1, states, parameters + states]: d state / d parameter
   * for every parameter in order, then d state / d initial state for every state in order.
   */
  readonly pathWithSensitivities: (
    initial: Float64Array,
    parameters: Float64Array,
    inputs: readonly Float64Array[],
    from: number,
    periods: number,
    values: Float64Array,
    sensitivities: Float64Array,
  ) => void;
  /**
   * One period for the paths first..last-1 of many, in place: steps of different paths overlap, so this is several times
   * faster per path than `step`. present [paths, states]; parameters [parameters], shared by all.
   */
  readonly advance: Advance;
  /** The same with parameters of its own for every path: parameters [paths, parameters]. */
  readonly advanceEach: Advance;
  /**
   * The quantities inside the period that begins at t, for paths first..last-1. parameters [paths, parameters], or
   * [parameters] with `stride` 0. out [quantities][paths].
   */
  readonly quantities: (
    present: Float64Array,
    first: number,
    last: number,
    parameters: Float64Array,
    stride: number,
    inputs: readonly Float64Array[],
    t: number,
    out: readonly Float64Array[],
  ) => void;
  /**
   * Gives the function that computes the sums of a least-squares fit of the whole path, or of its logarithms;
   * undefined where code is not generated or there are too many unknowns.
   */
  readonly pathSums: ((logarithmic: boolean) => PathSums) | undefined;
  /** The same for single steps from recorded states. */
  readonly stepSums: ((logarithmic: boolean) => StepSums) | undefined;
}

/** Moves paths first..last-1 one period on from t, in place. */
export type Advance = (
  present: Float64Array,
  first: number,
  last: number,
  parameters: Float64Array,
  inputs: readonly Float64Array[],
  t: number,
) => void;

/**
 * Runs a path and returns the sum of (weight * (observed - state))^2, with its sums by the unknowns, which are the
 * parameters in order and then the initial states: J'J, upper triangle row after row, then J'r.
 *
 * observed and weights [periods + 1, states]; a weight of 0 leaves a value out. sums [m (m + 1)/2 + m].
 */
export type PathSums = (
  initial: Float64Array,
  parameters: Float64Array,
  inputs: readonly Float64Array[],
  from: number,
  periods: number,
  observed: Float64Array,
  weights: Float64Array,
  sums: Float64Array,
) => number;

/**
 * Takes one step from each of many recorded states and returns the sum of (weight * (observed - next state))^2, with its
 * sums by the parameters: J'J, upper triangle row after row, then J'r.
 *
 * periods [pairs]; from, observed and weights [pairs, states]; a weight of 0 leaves a value out. sums [m (m + 1)/2 + m].
 */
export type StepSums = (
  parameters: Float64Array,
  inputs: readonly Float64Array[],
  periods: Int32Array,
  from: Float64Array,
  observed: Float64Array,
  weights: Float64Array,
  sums: Float64Array,
) => number;
