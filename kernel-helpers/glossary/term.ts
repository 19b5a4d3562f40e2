/** A word of the trade. */
export interface Term {
  readonly name: string;
  /** Other ways to say exactly this. */
  readonly otherNames: readonly string[];
  readonly field: "debts" | "cultures" | "stock" | "every field";
  /** What it means, in one or two sentences. */
  readonly meaning: string;
  /** Words it is taken for, each with the difference. */
  readonly notToBeTakenFor: Readonly<Record<string, string>>;
}

export function term(
  field: Term["field"],
  name: string,
  meaning: string,
  notToBeTakenFor: Term["notToBeTakenFor"] = {},
  otherNames: readonly string[] = [],
): Term {
  return Object.freeze({ name, otherNames, field, meaning, notToBeTakenFor });
}
