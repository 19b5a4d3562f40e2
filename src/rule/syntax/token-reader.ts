import { ruleError, tooLargeError } from "../errors.js";
import { readTokens } from "./read-tokens.js";
import type { Span, Token } from "./token.js";

/** Limits that protect time and stack against hostile or runaway texts. */
export const limits: { readonly letters: number; readonly depth: number; readonly nodes: number } = {
  letters: 20_000,
  depth: 100,
  nodes: 5_000,
};

/** The tokens of one rule with a current position; counts are checked against the limits. */
export interface TokenReader {
  readonly text: string;
  readonly peek: (ahead?: number) => Token;
  readonly take: () => Token;
  /** Takes the symbol if it comes next. */
  readonly accept: (sign: string) => boolean;
  readonly expect: (sign: string, remedy: string) => Token;
  /** Counts one more term or operator, at the place. */
  readonly count: (place: Span) => void;
  /** Reads a nested part; throws when nested too deeply. */
  readonly nested: <T>(read: () => T) => T;
}

function limitedTokens(text: string): readonly Token[] {
  if (text.length > limits.letters) {
    throw tooLargeError("characters", limits.letters, text.length, text, {
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
      throw ruleError("missing-sign", text, found, `"${sign}" is missing ${placeBefore(found)}.`, remedy);
    },
    count: (place) => {
      nodes++;
      if (nodes > limits.nodes) throw tooLargeError("terms and operators", limits.nodes, nodes, text, place);
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

/** How a message names the position in front of a token. */
export function placeBefore(token: Token): string {
  if (token.kind === "end") return "at the end of the rule";
  if (token.kind === "newline") return "at the end of the line";
  return `before "${token.text}"`;
}
