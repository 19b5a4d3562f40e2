/** Limits of an unknown. A limit that the record does not give is undefined, and the reason is in `note`. */
export interface Interval {
  readonly kind: "profile" | "wald" | "bootstrap" | "grid";
  readonly level: number;
  readonly lower: number | undefined;
  readonly upper: number | undefined;
  readonly note: string;
}

/** Estimate +- t(n - p) standard errors; undefined where there is no standard error. */
export function waldInterval(
  value: number,
  standardError: number | undefined,
  quantile: number,
  level: number,
): Interval | undefined {
  if (standardError === undefined) return undefined;
  const half = quantile * standardError;
  return { kind: "wald", level, lower: value - half, upper: value + half, note: "" };
}
