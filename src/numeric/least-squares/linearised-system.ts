/**
 * What a least-squares problem tells the solver. With residuals r [rows] and their Jacobian J [rows, size]
 * at a point, R'R = J'J and R'z = J'r, where R [size, size] is upper triangular (row-major) and z is [size].
 *
 * The solver calls `evaluate` at a trial point and, only when it moves there, `linearise` next, at the same
 * point. So a system may gather everything in one pass of `evaluate`, but must write `triangle` and
 * `projected` in `linearise` alone: after a refused trial the solver still needs those of the old point.
 */
export interface LinearisedSystem {
  readonly size: number;
  /** R, row-major [size, size]; entries below the diagonal are not read. A zero on the diagonal is allowed. */
  readonly triangle: Float64Array;
  /** z [size]. */
  readonly projected: Float64Array;
  /** The sum of squares at the parameters; not finite where the model breaks down. */
  readonly evaluate: (parameters: Float64Array) => number;
  /** Fills `triangle` and `projected` at the point evaluated last; false where the Jacobian is not finite. */
  readonly linearise: (parameters: Float64Array) => boolean;
}
