import { formula, type Rule } from "../../rule/index.js";
import { fromDecimal } from "../exact/rational.js";
import { noClosedForm } from "../refusals.js";
import { type HeldSetting, type HeldStep, holdStep } from "../setting/held-step.js";
import { type InitialValues, initialVector } from "../setting/setting.js";
import { namedValues, refuseOutsideRange } from "../setting/valid-range.js";
import { type GuaranteedDigits, guaranteedDigits } from "../trajectory/guaranteed-digits.js";
import { trajectory } from "../trajectory/trajectory.js";
import { type ClosedTerm, closedTerms, termsAt } from "./closed-terms.js";
import { linearStep } from "./exact-matrix.js";
import type { ClosedRoot } from "./polynomial-roots.js";
import { termsText } from "./term-text.js";

export interface ClosedFormOptions extends HeldSetting {
  /**
   * First values by state, with lags a list, oldest first; those that the rule states or the fit estimates
   * may be left out.
   */
  readonly initial?: InitialValues;
  /** Significant digits that `guaranteed` asks for; default 10. */
  readonly digits?: number;
}

/** The values after t steps as formulas, without stepping. */
export interface ClosedForm {
  readonly kind: "closed-form";
  readonly rule: Rule;
  readonly parameters: Readonly<Record<string, number>>;
  /** `linear` = from the roots of the step; `named` = known of the rule from the catalogue. */
  readonly method: "linear" | "named";
  /** By state: text in the rule language, with t, parameters and first values (N0) where it is a named one. */
  readonly formulas: Readonly<Record<string, string>>;
  /** By state. */
  readonly tex: Readonly<Record<string, string>>;
  /** Of a linear step, largest modulus first; the amount added brings a root 1. */
  readonly roots: readonly ClosedRoot[];
  /** Of a linear step, by state. */
  readonly terms: Readonly<Record<string, readonly ClosedTerm[]>>;
  /** Values that a named formula reads. */
  readonly given: Readonly<Record<string, number>>;
  /** Largest relative difference between formula and stepping over the first periods. */
  readonly agreement: { readonly periods: number; readonly largest: number };
  /** How far stepping in computer numbers keeps its digits. */
  readonly guaranteed: GuaranteedDigits;
}

type Draft = Omit<ClosedForm, "agreement" | "guaranteed">;

function byState<T>(rule: Rule, of: (slot: number) => T): Readonly<Record<string, T>> {
  return Object.fromEntries(rule.states.map((name, slot) => [name, of(slot)]));
}

function common(held: HeldStep): Pick<Draft, "kind" | "rule" | "parameters"> {
  const { rule, parameters } = held;
  return { kind: "closed-form", rule, parameters: namedValues(rule, parameters, undefined) };
}

function namedForm(held: HeldStep, initial: Float64Array): Draft | undefined {
  const { rule } = held;
  const inputs = Object.fromEntries(rule.inputs.map((name, i) => [name, held.inputs[i]!]));
  const given = { ...namedValues(rule, held.parameters, initial), ...inputs };
  const found = rule.named?.closedForms.find(
    ({ when, values }) =>
      rule.states.every((state) => state in values) &&
      (when === undefined || formula(when, "condition").at(given) === 1),
  );
  if (found === undefined) return undefined;
  const texts = rule.states.map((state) => found.values[state]!);
  return {
    ...common(held),
    method: "named",
    formulas: byState(rule, (slot) => texts[slot]!),
    tex: byState(rule, (slot) => formula(texts[slot]!).tex),
    roots: [],
    terms: {},
    given,
  };
}

function linearForm(held: HeldStep, initial: Float64Array): Draft | undefined {
  const { rule } = held;
  const step = linearStep(rule, held);
  if (step === undefined) return undefined;
  const { roots, terms } = closedTerms(step, Array.from(initial, fromDecimal), rule.states.length);
  const texts = terms.map(termsText);
  return {
    ...common(held),
    method: "linear",
    formulas: byState(rule, (slot) => texts[slot]!),
    tex: byState(rule, (slot) => formula(texts[slot]!).tex),
    roots,
    terms: byState(rule, (slot) => terms[slot]!),
    given: {},
  };
}

/** The values of a closed form after t steps, by state. */
export function closedFormAt(
  form: Pick<ClosedForm, "rule" | "method" | "formulas" | "terms" | "given">,
  t: number,
): Readonly<Record<string, number>> {
  const { rule, method, formulas, terms, given } = form;
  return Object.fromEntries(
    rule.states.map((state) => [
      state,
      method === "linear" ? termsAt(terms[state]!, t) : formula(formulas[state]!).at(given, t),
    ]),
  );
}

/** A chaotic path leaves any formula after some steps, through rounding alone; it is compared while digits last. */
function agreementOf(
  draft: Draft,
  options: ClosedFormOptions,
  guaranteed: GuaranteedDigits,
): ClosedForm["agreement"] {
  const periods = Math.min(40, Math.max(1, guaranteed.periods));
  const run = trajectory(draft.rule, { ...options, periods });
  let largest = 0;
  for (let t = 0; t <= run.periods; t++) {
    for (const [state, value] of Object.entries(closedFormAt(draft, t))) {
      const stepped = run.values[state]![t]!;
      largest = Math.max(largest, Math.abs(value - stepped) / Math.max(Math.abs(stepped), 1e-300));
    }
  }
  return { periods: run.periods, largest };
}

/**
 * Finds the values after t steps without stepping.
 *
 * Linear rules and systems of any order with constant coefficients are solved from the roots of their
 * characteristic polynomial, found over exact fractions, so that repeated roots are known to be repeated. Rules of
 * the catalogue give the form that is known of them. Every form is compared with stepping.
 *
 * @throws {ModelError} `no-closed-form` where none is known; `outside-range` where the parameters do not fit the rule.
 * @example closedForm(recurrence("x[t+1] = 6*x - 9*x[t-1]"), { initial: { x: [0, 1] } }).roots[0].exact; // "3"
 */
export function closedForm(rule: Rule, options: ClosedFormOptions = {}): ClosedForm {
  const held = holdStep(rule, options, "closed form");
  const initial = initialVector(rule, options.initial);
  refuseOutsideRange(rule, namedValues(rule, held.parameters, initial));
  const draft = namedForm(held, initial) ?? linearForm(held, initial);
  if (draft === undefined) throw noClosedForm(rule.named?.title ?? "This rule");
  const guaranteed = guaranteedDigits(rule, options);
  return { ...draft, agreement: agreementOf(draft, options, guaranteed), guaranteed };
}
