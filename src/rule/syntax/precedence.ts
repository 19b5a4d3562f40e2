import type { Token } from "./token.js";

/** Operator precedence; a larger number binds tighter. Unary minus lies between * and ^, `not` above `and`. */
export const precedence: ReadonlyMap<string, number> = new Map([
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
export const unaryMinusPrecedence = 7;
export const notPrecedence = 3;
export const comparisonPrecedence = 4;

/** Precedence of a token as a binary operator; 0 if it is none. */
export const binaryPrecedence = (token: Token): number =>
  token.kind === "sign" || token.kind === "name" ? (precedence.get(token.text) ?? 0) : 0;
