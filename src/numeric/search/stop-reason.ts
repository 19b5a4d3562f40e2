/** Why a search stopped. Only `converged` is an answer; the others are results a reader must see as such. */
export type StopReason =
  | { readonly kind: "converged"; readonly test: "gradient" | "step" | "reduction" }
  | { readonly kind: "iteration-limit" }
  | { readonly kind: "failed"; readonly reason: string };
