import { didYouMean, ModelError, nearestNames } from "../numeric/index.js";
import type { RuleFunction } from "./functions.js";
import type { Span } from "./syntax/token.js";

/** The line of the text around a span, with a caret under each of its characters. */
function excerptWithCarets(text: string, place: Span): string {
  const from = text.lastIndexOf("\n", place.start - 1) + 1;
  const lineEnd = text.indexOf("\n", from);
  const to = lineEnd === -1 ? text.length : lineEnd;
  // Long lines are cut around the place so that the caret stays in sight.
  const cut = Math.max(from, place.start - 60);
  const shown = text.slice(cut, Math.min(to, place.start + 60)).replace(/\s/gu, " ");
  const before = [...text.slice(cut, place.start)].length;
  const carets = Math.max(1, [...text.slice(place.start, Math.min(place.end, to, place.start + 60))].length);
  return `    ${shown}\n    ${" ".repeat(before)}${"^".repeat(carets)}`;
}

/** An error that points into the rule's text: what is wrong, where, what to write instead. */
export function ruleError(
  code: string,
  text: string,
  place: Span,
  wrong: string,
  remedy: string,
): ModelError {
  const start = Math.min(place.start, text.length);
  const end = Math.min(Math.max(place.end, start), text.length);
  const message = `${wrong}\n${excerptWithCarets(text, { start, end })}\n${remedy}`;
  return new ModelError(code, message, { text, start, end });
}

const nameList = (names: readonly string[]): string => (names.length === 0 ? "none" : names.join(", "));

/** "Did you mean ...?" for the nearest of the known names, or nothing. */
export const suggestion = (name: string, known: readonly string[]): string =>
  didYouMean(nearestNames(name, known));

export function unknownNameError(
  text: string,
  place: Span,
  name: string,
  known: {
    readonly parameters: readonly string[];
    readonly others: readonly string[];
    readonly functions: readonly string[];
  },
): ModelError {
  const others = known.others.length === 0 ? "" : ` Other names: ${nameList(known.others)}.`;
  const hint = suggestion(name, [...known.parameters, ...known.others, ...known.functions]);
  return ruleError(
    "unknown-name",
    text,
    place,
    `Unknown name "${name}" in the rule.`,
    `Known parameters: ${nameList(known.parameters)}.${others}${hint}`,
  );
}

export const misplacedChangeRemedy =
  "Write the change as a line of its own, as in ΔN = r*N. For the last change, write N - N[t-1].";

export function missingOperatorError(text: string, place: Span, left: string, right: string): ModelError {
  return ruleError(
    "implied-product",
    text,
    place,
    `An operator is missing between "${left}" and "${right}".`,
    `For a product, write ${left}*${right}.`,
  );
}

export function unknownFunctionError(text: string, place: Span, name: string, remedy: string): ModelError {
  return ruleError("not-a-function", text, place, `"${name}" is not a function.`, remedy);
}

export function argumentCountError(
  text: string,
  place: Span,
  called: RuleFunction,
  given: number,
): ModelError {
  const { name, minArgs, maxArgs, usage } = called;
  const most = maxArgs - minArgs > 1 ? ` or more` : ` or ${maxArgs}`;
  const wanted = `${minArgs}${minArgs === maxArgs ? "" : most} ${maxArgs === 1 ? "argument" : "arguments"}`;
  return ruleError(
    "wrong-arity",
    text,
    place,
    `"${name}" takes ${wanted}; ${given} ${given === 1 ? "was" : "were"} given.`,
    `Write ${usage}.`,
  );
}

export function tooLargeError(
  what: string,
  limit: number,
  given: number,
  text: string,
  place: Span,
): ModelError {
  return ruleError(
    "rule-too-large",
    text,
    place,
    `The rule has ${given} ${what}; the limit is ${limit}.`,
    "Split it into several lines with named quantities, or into several rules.",
  );
}
