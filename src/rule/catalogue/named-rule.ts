/** A parameter, state or input of a named rule: what it is, and its unit in terms of "level" and "period". */
export interface NamedQuantity {
  readonly meaning: string;
  /** "level" stands for the unit of the state; "" is a pure number. */
  readonly unit: string;
}

/** Values that a named rule leaves as they are, as formulas of its parameters. */
export interface NamedEquilibrium {
  /** By state. */
  readonly at: Readonly<Record<string, string>>;
  /** Slope of the step there; absent for systems and lags. */
  readonly multiplier?: string;
  /** Condition on the parameters under which it exists; absent = always. */
  readonly when?: string;
}

/** The value after t steps, as formulas of the parameters, the first values (N0 of N) and t. */
export interface NamedClosedForm {
  /** Condition on the parameters under which it holds; absent = always. */
  readonly when?: string;
  /** By state. */
  readonly values: Readonly<Record<string, string>>;
}

/**
 * What is known of a rule with a name, as plain data: every formula is text in the rule language, so that it can
 * be printed, checked and worked out.
 */
export interface NamedRule {
  readonly name: string;
  readonly title: string;
  readonly source: string;
  readonly quantities: Readonly<Record<string, NamedQuantity>>;
  /** Parameters that a record often holds as a column of its own, as a catch: they become inputs when said so. */
  readonly optionalInputs?: readonly string[];
  /** Conditions under which the rule means what it says; outside them results are refused. */
  readonly validWhen: readonly string[];
  readonly equilibria: readonly NamedEquilibrium[];
  readonly closedForms: readonly NamedClosedForm[];
  /** What practice and mathematics say of its stability and use. */
  readonly remarks: string;
}

/** A named rule with its text and what a fit needs to know. */
export interface CatalogueEntry extends NamedRule {
  readonly text: string;
  readonly inputs?: readonly string[];
  readonly bounds?: Readonly<Record<string, readonly [number, number]>>;
  readonly start?: Readonly<Record<string, number>>;
}
