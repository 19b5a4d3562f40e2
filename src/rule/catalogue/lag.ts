/** Delay in whole periods. */
export interface LagOption {
  /** Delay in whole periods. */
  readonly lag: number;
}

/** How a name is written as it was some periods ago. */
export const lagged = (name: string, lag: number): string => (lag === 0 ? name : `${name}[t-${lag}]`);
