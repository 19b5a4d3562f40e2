/** Scratch arrays of the solver; made once a problem size, so that thousands of fits allocate nothing more. */
export interface SquaresWorkspace {
  readonly size: number;
  /** Triangle and right-hand side of the parameters that may move, re-triangularised when some are held. */
  readonly triangle: Float64Array;
  readonly projected: Float64Array;
  /** The damped triangle of a trust-region step, and its right-hand side. */
  readonly damped: Float64Array;
  readonly dampedProjected: Float64Array;
  readonly row: Float64Array;
  /** Scale of each parameter: the largest column norm of the Jacobian met so far. */
  readonly scale: Float64Array;
  readonly freeScale: Float64Array;
  /** Numbers of the parameters that may move in the present step. */
  readonly free: Int32Array;
  readonly held: Uint8Array;
  readonly gradient: Float64Array;
  readonly freeStep: Float64Array;
  readonly step: Float64Array;
  readonly trial: Float64Array;
  readonly work: Float64Array;
}

/** The arrays for problems of `size` parameters. */
export function squaresWorkspace(size: number): SquaresWorkspace {
  const vector = (): Float64Array => new Float64Array(size);
  const square = (): Float64Array => new Float64Array(size * size);
  return {
    size,
    triangle: square(),
    projected: vector(),
    damped: square(),
    dampedProjected: vector(),
    row: vector(),
    scale: vector(),
    freeScale: vector(),
    free: new Int32Array(size),
    held: new Uint8Array(size),
    gradient: vector(),
    freeStep: vector(),
    step: vector(),
    trial: vector(),
    work: vector(),
  };
}
