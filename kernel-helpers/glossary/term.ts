/** Field of work that a term belongs to. */
export type TermField = "debts" | "cultures" | "stock" | "harvest" | "general" | "rule language";

/** A term of the glossary. */
export interface Term {
  readonly name: string;
  /** Synonyms and abbreviations. */
  readonly otherNames: readonly string[];
  readonly field: TermField;
  /** Definition in one to three sentences. */
  readonly meaning: string;
  /** Formula as plain text; "" = none. */
  readonly formula: string;
  /** Unit, such as "1/hour"; "" = none. */
  readonly unit: string;
  /** Terms it is mistaken for, each with the difference. */
  readonly mistakenFor: Readonly<Record<string, string>>;
  /** Other terms of the glossary to read next. */
  readonly related: readonly string[];
}

interface TermDetails {
  readonly otherNames?: readonly string[];
  readonly formula?: string;
  readonly unit?: string;
  readonly mistakenFor?: Readonly<Record<string, string>>;
  readonly related?: readonly string[];
}

/** A function that defines terms of one field. */
export function termsOf(field: TermField): (name: string, meaning: string, details?: TermDetails) => Term {
  return (name, meaning, details = {}) =>
    Object.freeze({
      name,
      field,
      meaning,
      otherNames: details.otherNames ?? [],
      formula: details.formula ?? "",
      unit: details.unit ?? "",
      mistakenFor: details.mistakenFor ?? {},
      related: details.related ?? [],
    });
}
