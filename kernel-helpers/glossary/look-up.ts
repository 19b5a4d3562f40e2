import { nearestNames } from "../../src/numeric/index.js";
import { nearWords } from "./near-words.js";
import type { Term, TermField } from "./term.js";
import { terms } from "./terms.js";

/** What a word means: a term, and the other terms that it could mean. */
export interface LookUp {
  readonly term: Term;
  /** Whether the word is the term itself, a synonym of it included. */
  readonly isExact: boolean;
  /** Names of the other terms that the word could mean. */
  readonly others: readonly string[];
}

/** Lower case, hyphens as spaces, without a plural "s": "Profile-Intervals" -> "profile interval". */
const normalized = (word: string): string =>
  word
    .trim()
    .toLowerCase()
    .replace(/[-_\s]+/gu, " ")
    .replace(/(?<=[^s\s]{2})s$/u, "");

const namesOf = (term: Term): readonly string[] => [term.name, ...term.otherNames];

/** Terms by every normalized name; a name that several fields use has several terms. */
const byName: ReadonlyMap<string, readonly Term[]> = terms.reduce((found, term) => {
  for (const name of new Set(namesOf(term).map(normalized)))
    found.set(name, [...(found.get(name) ?? []), term]);
  return found;
}, new Map<string, readonly Term[]>());

/** Terms of the field first, in their order. */
const fieldFirst = (found: readonly Term[], field: string | undefined): readonly Term[] => [
  ...found.filter((term) => term.field === field),
  ...found.filter((term) => term.field !== field),
];

const nearByName: ReadonlyMap<string, readonly Term[]> = new Map(
  Object.entries(nearWords).map(([word, names]) => [
    normalized(word),
    names.flatMap((name) => byName.get(normalized(name)) ?? []),
  ]),
);

/** Terms of which the word is a part, or which are a part of the word. */
function partialMatches(word: string): readonly Term[] {
  const asked = new Set(word.split(" ").filter((part) => part.length > 2));
  const fits = (name: string): boolean => {
    const parts = normalized(name).split(" ");
    const shared = parts.filter((part) => asked.has(part)).length;
    return shared > 0 && (shared === asked.size || (parts.length > 1 && shared === parts.length));
  };
  return terms.filter((term) => term.field !== "rule language" && namesOf(term).some(fits));
}

/**
 * Finds the term for a word: the term itself, a synonym, a related word ("growth rate" leads to "specific growth
 * rate"), or the only terms that contain it.
 *
 * @param field - field of the open case, whose terms come first.
 * @returns undefined when there is none.
 */
export function lookUp(word: string, field?: TermField | string): LookUp | undefined {
  const asked = normalized(word);
  const exact = byName.get(asked);
  const found = fieldFirst(exact ?? nearByName.get(asked) ?? partialMatches(asked), field);
  const [term, ...rest] = found;
  if (term === undefined) return undefined;
  return { term, isExact: exact !== undefined, others: rest.map(({ name }) => name) };
}

/** Names of terms near to a mistyped one; symbols of one or two letters are near to anything. */
export const nearestTerms = (word: string): readonly string[] =>
  nearestNames(
    word.trim(),
    terms.flatMap(namesOf).filter((name) => name.length > 2),
  );

/** Names of all terms by field, the field of the open case first, then the general ones. */
export function termsByField(
  field?: string,
): readonly { readonly field: TermField; readonly names: readonly string[] }[] {
  const fields = [...new Set(terms.map((term) => term.field))];
  const rank = (one: TermField): number => (one === field ? 0 : one === "general" ? 1 : 2);
  return fields
    .sort((a, b) => rank(a) - rank(b))
    .map((one) => ({
      field: one,
      names: terms
        .filter((term) => term.field === one)
        .map(({ name }) => name)
        .sort((a, b) => a.localeCompare(b, "en")),
    }));
}
