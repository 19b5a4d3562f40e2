import type { Operator } from "./node.js";

/** One operation: its value, and the source that computes the same value from the sources of its arguments. */
interface Operation {
  readonly value: (a: number, b: number, c: number) => number;
  readonly code: (a: string, b: string, c: string) => string;
}

/**
 * Rounds to decimal digits, halves away from zero. A value within two units of its last binary place of a half
 * is treated as a half, because most decimal halves have no exact binary form.
 */
export function roundTo(x: number, digits: number): number {
  const scale = 10 ** digits;
  const size = Math.abs(x) * scale;
  if (!(size < 2 ** 52)) return x;
  return (Math.sign(x) * Math.floor(size * (1 + 2 ** -51) + 0.5)) / scale;
}

/** Remainder with the sign of the divisor, so that mod(t, 12) counts months for negative t too. */
export const modulo = (x: number, divisor: number): number => x - divisor * Math.floor(x / divisor);

const truth = (holds: boolean): number => (holds ? 1 : 0);
const call =
  (name: string) =>
  (a: string): string =>
    `Math.${name}(${a})`;
const call2 =
  (name: string) =>
  (a: string, b: string): string =>
    `${name}(${a}, ${b})`;
const join =
  (sign: string) =>
  (a: string, b: string): string =>
    `(${a} ${sign} ${b})`;

/** Conditions are 1 or 0 as values and true or false in code; only `choose`, and, or, not read them. */
export const operations: Readonly<Record<Operator, Operation>> = {
  add: { value: (a, b) => a + b, code: join("+") },
  subtract: { value: (a, b) => a - b, code: join("-") },
  multiply: { value: (a, b) => a * b, code: join("*") },
  divide: { value: (a, b) => a / b, code: join("/") },
  power: { value: (a, b) => a ** b, code: call2("Math.pow") },
  negate: { value: (a) => -a, code: (a) => `(-${a})` },
  less: { value: (a, b) => truth(a < b), code: join("<") },
  lessOrEqual: { value: (a, b) => truth(a <= b), code: join("<=") },
  equal: { value: (a, b) => truth(a === b), code: join("===") },
  and: { value: (a, b) => truth(a === 1 && b === 1), code: join("&&") },
  or: { value: (a, b) => truth(a === 1 || b === 1), code: join("||") },
  not: { value: (a) => 1 - a, code: (a) => `(!${a})` },
  choose: { value: (a, b, c) => (a === 1 ? b : c), code: (a, b, c) => `(${a} ? ${b} : ${c})` },
  exp: { value: Math.exp, code: call("exp") },
  log: { value: Math.log, code: call("log") },
  log10: { value: Math.log10, code: call("log10") },
  sqrt: { value: Math.sqrt, code: call("sqrt") },
  abs: { value: Math.abs, code: call("abs") },
  sign: { value: Math.sign, code: call("sign") },
  min: { value: (a, b) => Math.min(a, b), code: call2("Math.min") },
  max: { value: (a, b) => Math.max(a, b), code: call2("Math.max") },
  floor: { value: Math.floor, code: call("floor") },
  ceil: { value: Math.ceil, code: call("ceil") },
  round: { value: roundTo, code: call2("roundTo") },
  mod: { value: modulo, code: call2("modulo") },
  sin: { value: Math.sin, code: call("sin") },
  cos: { value: Math.cos, code: call("cos") },
  tan: { value: Math.tan, code: call("tan") },
  asin: { value: Math.asin, code: call("asin") },
};
