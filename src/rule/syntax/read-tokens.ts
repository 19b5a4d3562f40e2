import { ruleError } from "../errors.js";
import type { Token } from "./token.js";

/** Signs of other alphabets that mean the same to a reader, and what they are read as. */
const equivalents: ReadonlyMap<string, string> = new Map([
  ["\u2212", "-"],
  ["\u00d7", "*"],
  ["\u00b7", "*"],
  ["\u22c5", "*"],
  ["\u2264", "<="],
  ["\u2265", ">="],
  ["\u2260", "!="],
  ["\u0394", "Δ"],
  ["\u2206", "Δ"],
]);

/** What to write instead of a sign that other notations have and this one has not. */
const remedies: ReadonlyMap<string, string> = new Map([
  ["**", "Write a power with ^, as in N^2."],
  ["&&", "Write and."],
  ["||", "Write or."],
  ["%", "Write the number as a fraction, as in 5/100, or use mod(x, m)."],
  ["'", "Write the next value as N[t+1]."],
  [";", "Begin a new line for each quantity."],
  ["{", "Use round brackets to group, as in (a + b)*c."],
  ["!", "Write not, or != for unequal."],
]);

const patterns: readonly (readonly [Token["kind"] | "skip", RegExp])[] = [
  ["skip", /[^\S\n]+|#[^\n]*/uy],
  ["newline", /\n/uy],
  ["number", /(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?/uy],
  ["sign", /[\u0394\u2206]/uy],
  ["name", /[\p{L}_][\p{L}\p{M}\p{N}_]*/uy],
  ["sign", /<=|>=|==|!=|[-+*/^()[\],=<>\u2212\u00d7\u00b7\u22c5\u2264\u2265\u2260]/uy],
];

function unknownSymbol(text: string, start: number): never {
  const pair = text.slice(start, start + 2);
  const sign = remedies.has(pair) ? pair : String.fromCodePoint(text.codePointAt(start)!);
  const remedy = remedies.get(sign) ?? "Rules use names, numbers, + - * / ^ ( ) [ ] , and comparisons.";
  throw ruleError(
    "unreadable-sign",
    text,
    { start, end: start + sign.length },
    `The sign "${sign}" has no meaning in a rule.`,
    remedy,
  );
}

function nextToken(text: string, start: number): { kind: Token["kind"] | "skip"; end: number } {
  if (text.startsWith("**", start)) unknownSymbol(text, start);
  for (const [kind, pattern] of patterns) {
    pattern.lastIndex = start;
    if (pattern.test(text)) return { kind, end: pattern.lastIndex };
  }
  return unknownSymbol(text, start);
}

/** Cuts a normalised text into tokens, each with its place. Comments and blanks leave no token. */
export function readTokens(text: string): readonly Token[] {
  const tokens: Token[] = [];
  for (let start = 0; start < text.length; ) {
    const { kind, end } = nextToken(text, start);
    const raw = text.slice(start, end);
    if (kind !== "skip") tokens.push({ kind, text: equivalents.get(raw) ?? raw, start, end });
    start = end;
  }
  tokens.push({ kind: "end", text: "", start: text.length, end: text.length });
  return tokens;
}
