import { list } from "../wording/index.js";
import type { Kind, Range } from "./option.js";

export const inCode = (name: string): string => `\`${name}\``;

const quoted = (words: readonly string[]): readonly string[] => words.map((word) => JSON.stringify(word));

/** What a value of a kind is, as after "must be". */
export function mustBe(kind: Kind): string {
  switch (kind.is) {
    case "number":
      return numberWords(kind);
    case "text":
      return kind.words ?? "a text";
    case "bigint":
      return "a bigint";
    case "flag":
      return "true or false";
    case "function":
      return "a function";
    case "signal":
      return "the signal of an AbortController";
    case "anything":
      return "a value";
    case "choice":
      return list(quoted(kind.of), "or");
    case "list":
      return listWords(kind);
    case "named":
      return `an object that holds, by name, ${mustBe(kind.of.kind)}`;
    case "shape":
      return `an object with ${list(Object.keys(kind.fields).map(inCode))}`;
    case "variants":
      return `an object with ${inCode(kind.by)}: ${list(quoted(Object.keys(kind.of)), "or")}`;
    case "measures":
      return `an object with one of ${list(Object.keys(kind.of).map(inCode), "or")}`;
    case "either":
      return list(
        kind.of.map((each) => mustBe(each.kind)),
        "or",
      );
    case "result":
      return `a ${kind.of}`;
  }
}

function listWords({ of, length, least = 0 }: Extract<Kind, { is: "list" }>): string {
  const each = mustBe(of.kind);
  if (length !== undefined)
    return of.kind.is === "number" ? "two numbers in a list" : `a list of ${length}, each ${each}`;
  return `a list${least > 0 ? " with" : " of"} ${least > 0 ? `at least ${least}, each ` : ""}${each}`;
}

function numberWords({ from, above, to, below, whole, open }: Range): string {
  const noun = whole === true ? "a whole number" : "a number";
  if (above !== undefined && below !== undefined) return `between ${above} and ${below}`;
  if (from !== undefined && to !== undefined) return `${noun} from ${from} to ${to}`;
  if (from !== undefined) return `${noun} of at least ${from}`;
  if (above !== undefined) return `${noun} above ${above}`;
  if (to !== undefined) return `${noun} of at most ${to}`;
  return whole === true ? noun : open === true ? "a number" : "a finite number";
}
