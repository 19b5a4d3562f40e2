import { ruleError } from "../errors.js";
import { subscriptRemedy } from "./other-notations.js";
import type { Token } from "./token.js";

/** Unicode symbols that are read as their ASCII or Greek equivalents. */
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

/** What to write instead of symbols of other notations. */
const remedies: ReadonlyMap<string, string> = new Map([
  ["**", "For a power, write ^, as in N^2."],
  ["&&", "Write the word and."],
  ["||", "Write the word or."],
  ["%", "For 5%, write 5/100; for a remainder, mod(x, m)."],
  ["'", "For the next value, write N[t+1]; for the change, ΔN."],
  [";", "Start a new line for each equation."],
  ["{", "Use round brackets, as in (a + b)*c."],
  ["!", "Write the word not, or != for unequal."],
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
  const remedy =
    subscriptRemedy(text, start) ??
    remedies.get(sign) ??
    "Rules use names, numbers, + - * / ^ ( ) [ ] , and comparisons.";
  throw ruleError(
    "unreadable-sign",
    text,
    { start, end: start + sign.length },
    `"${sign}" is not part of the rule language.`,
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
