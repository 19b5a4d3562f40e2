import type { Bounds } from "../recurrence-options.js";

/** A state, parameter or input of a catalogue rule: its meaning, and its unit in terms of "level" and "period". */
export interface NamedQuantity {
  readonly meaning: string;
  /** "level" stands for the unit of the state; "" is dimensionless. */
  readonly unit: string;
}

/** An equilibrium of a catalogue rule, as formulas of its parameters. */
export interface NamedEquilibrium {
  /** By state. */
  readonly at: Readonly<Record<string, string>>;
  /** Multiplier: slope of the step at the equilibrium; absent for systems and rules with lags. */
  readonly multiplier?: string;
  /** Condition on the parameters for it to exist; absent = always. */
  readonly when?: string;
}

/** The value after t steps, as formulas of the parameters, the initial values (N0 of N) and t. */
export interface NamedClosedForm {
  /** Condition on the parameters for it to be valid; absent = always. */
  readonly when?: string;
  /** By state. */
  readonly values: Readonly<Record<string, string>>;
}

/**
 * What is known of a catalogue rule, as plain data: every formula is text in the rule language, so that it can be
 * printed, checked and evaluated.
 */
export interface NamedRule {
  readonly name: string;
  readonly title: string;
  readonly source: string;
  readonly quantities: Readonly<Record<string, NamedQuantity>>;
  /** Parameters that are often recorded by period, such as a catch: `{ inputs: ["C"] }` makes them inputs. */
  readonly optionalInputs?: readonly string[];
  /** Conditions on parameters and initial values; outside them results are rejected. */
  readonly validWhen: readonly string[];
  readonly equilibria: readonly NamedEquilibrium[];
  readonly closedForms: readonly NamedClosedForm[];
  /** Stability and use. */
  readonly remarks: string;
}

/** A catalogue rule with its text and the settings of a fit. */
export interface CatalogueEntry extends NamedRule {
  readonly text: string;
  readonly inputs?: readonly string[];
  readonly bounds?: Readonly<Record<string, Bounds>>;
  readonly start?: Readonly<Record<string, number>>;
}
