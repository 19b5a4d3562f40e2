import { ruleError, tooLargeError } from "../errors.js";
import { readTokens } from "./read-tokens.js";
import type { Span, Token } from "./token.js";

/** Limits that keep a hostile or runaway text from taking time or stack. */
export const limits: { readonly letters: number; readonly depth: number; readonly nodes: number } = {
  letters: 20_000,
  depth: 100,
  nodes: 5_000,
};

/** The tokens of one rule with a current position, and counts held to the limits. */
export interface TokenReader {
  readonly text: string;
  readonly peek: (ahead?: number) => Token;
  readonly take: () => Token;
  /** Takes the sign if it comes next. */
  readonly accept: (sign: string) => boolean;
  readonly expect: (sign: string, remedy: string) => Token;
  /** Counts one more part of the rule, at the place. */
  readonly count: (place: Span) => void;
  /** Runs the reading of a nested part, refused when nested too deeply. */
  readonly nested: <T>(read: () => T) => T;
}

function limitedTokens(text: string): readonly Token[] {
  if (text.length > limits.letters) {
    throw tooLargeError("letters", limits.letters, text.length, text, {
      start: limits.letters,
      end: limits.letters + 1,
    });
  }
  return readTokens(text);
}

export function tokenReader(text: string): TokenReader {
  const tokens = limitedTokens(text);
  let position = 0;
  let nodes = 0;
  let depth = 0;
  const peek = (ahead = 0): Token => tokens[Math.min(position + ahead, tokens.length - 1)]!;
  const take = (): Token => {
    const token = peek();
    position++;
    return token;
  };
  const isNext = (sign: string): boolean => peek().kind === "sign" && peek().text === sign;
  return {
    text,
    peek,
    take,
    accept: (sign) => isNext(sign) && take() !== undefined,
    expect: (sign, remedy) => {
      if (isNext(sign)) return take();
      const found = peek();
      throw ruleError("missing-sign", text, found, `A "${sign}" is missing ${placeBefore(found)}.`, remedy);
    },
    count: (place) => {
      nodes++;
      if (nodes > limits.nodes) throw tooLargeError("parts", limits.nodes, nodes, text, place);
    },
    nested: (read) => {
      depth++;
      if (depth > limits.depth) throw tooLargeError("levels of nesting", limits.depth, depth, text, peek());
      const result = read();
      depth--;
      return result;
    },
  };
}

/** How a message names the place in front of a token. */
export function placeBefore(token: Token): string {
  if (token.kind === "end") return "at the end of the rule";
  if (token.kind === "newline") return "at the end of the line";
  return `before "${token.text}"`;
}
