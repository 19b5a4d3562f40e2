import type { Token } from "./token.js";

/** Binding strength; a larger number binds closer. Unary minus stands between * and ^, `not` above `and`. */
export const strengths: ReadonlyMap<string, number> = new Map([
  ["or", 1],
  ["and", 2],
  ["<", 4],
  ["<=", 4],
  [">", 4],
  [">=", 4],
  ["==", 4],
  ["!=", 4],
  ["+", 5],
  ["-", 5],
  ["*", 6],
  ["/", 6],
  ["^", 8],
]);
export const unaryMinusStrength = 7;
export const notStrength = 3;
export const comparisonStrength = 4;

/** The strength with which a token joins what stands left of it; 0 if it joins nothing. */
export const joiningStrength = (token: Token): number =>
  token.kind === "sign" || token.kind === "name" ? (strengths.get(token.text) ?? 0) : 0;
