/** Time lag in whole periods. */
export interface LagOption {
  /** Delay in whole periods. */
  readonly lag: number;
}

/** A count of periods in a title. */
export const periodCount = (count: number): string => `${count} ${count === 1 ? "period" : "periods"}`;

/** A name as the rule language reads it some periods back. */
export const lagged = (name: string, lag: number): string => (lag === 0 ? name : `${name}[t-${lag}]`);
