import { type Rule, stepOver } from "../../rule/index.js";
import {
  missingInput,
  missingValue,
  notFinite,
  tooManyDigits,
  unreadableOption,
  wrongHistory,
} from "../refusals.js";
import { parseRational, type Rational, rational, rationalText, toNumber } from "./rational.js";
import { rationalAlgebra } from "./rational-algebra.js";

/** A number read as the decimal it prints as, or a text such as "1/3". */
export type ExactValue = number | string | bigint;

export interface ExactTrajectoryOptions {
  /** Parameters by name: numbers, read as the decimals they print as, or texts such as "1/3". */
  readonly parameters?: Readonly<Record<string, ExactValue>>;
  /** First values by state, or lists of them, oldest first, where the rule reads past values. */
  readonly initial: Readonly<Record<string, ExactValue | readonly ExactValue[]>>;
  /** By input: its values by period, period 0 first. */
  readonly inputs?: Readonly<Record<string, readonly ExactValue[]>>;
  /** Whole periods to run. */
  readonly periods: number;
}

/** A path in exact fractions. */
export interface ExactTrajectory {
  readonly kind: "exact-trajectory";
  readonly rule: Rule;
  readonly periods: number;
  /** By state: [periods + 1], as "7" or "-1/3". */
  readonly values: Readonly<Record<string, readonly string[]>>;
  /** By state: [periods + 1], the computer numbers nearest to them. */
  readonly numbers: Readonly<Record<string, Float64Array>>;
}

/** Fractions grow; beyond this many digits a path is refused rather than left to run. */
const mostDigits = 4_000;

function exactValue(
  role: string,
  name: string,
  value: ExactValue | undefined,
  given: readonly string[],
): Rational {
  if (value === undefined) throw missingValue(role, name, given);
  const found = parseRational(String(value));
  if (found === undefined) throw notFinite(role, name, value);
  return found;
}

function startOf(rule: Rule, { initial }: ExactTrajectoryOptions): Rational[] {
  const past = (state: string, lag: number): Rational => {
    const given = initial[state];
    const values: readonly (ExactValue | undefined)[] = Array.isArray(given) ? given : [given];
    const lags = rule.lags.filter((kept) => kept.state === state).length;
    if (values.length !== lags + 1) throw wrongHistory(state, lags + 1, values.length);
    return exactValue("first value of", state, values.at(-1 - lag), Object.keys(initial));
  };
  return [
    ...rule.states.map((state) => past(state, 0)),
    ...rule.lags.map(({ state, lag }) => past(state, lag)),
  ];
}

const digitsOf = ({ denominator, numerator }: Rational): number =>
  Math.max(denominator.toString(16).length, numerator.toString(16).length) * 1.21;

/**
 * Runs a rule in exact fractions: no rounding at all, however long the digits grow.
 *
 * Numbers are read as the decimals they print as, so 0.1 is one tenth; a text such as "1/3" is read as it stands.
 *
 * @param rule - built of + - * / and whole powers, min, max, if, abs, round and the like; functions whose values
 *   are no fractions are refused.
 * @throws {ModelError} `no-rational-value` | `too-many-digits` | `missing-value` | `wrong-history`.
 * @example exactTrajectory(recurrence("F[t+1] = F + F[t-1]"), { initial: { F: [0, 1] }, periods: 29 }).values.F[29]; // "832040"
 */
export function exactTrajectory(rule: Rule, options: ExactTrajectoryOptions): ExactTrajectory {
  const { periods } = options;
  if (!Number.isSafeInteger(periods) || periods < 0) {
    throw unreadableOption("periods", "a whole number from 0 on", periods);
  }
  const given: Readonly<Record<string, ExactValue>> = { ...rule.fixed, ...options.parameters };
  const parameters = rule.parameters.map((name) =>
    exactValue("parameter", name, given[name], Object.keys(given)),
  );
  const inputs = rule.inputs.map((name) =>
    (options.inputs?.[name] ?? []).map((value) => exactValue("input", name, value, [])),
  );
  const step = stepOver(rule, rationalAlgebra);
  const rows: Rational[][] = [startOf(rule, options)];
  for (let t = 0; t < periods; t++) {
    const input = (slot: number, offset: number): Rational => {
      const value = inputs[slot]![t + offset];
      if (value === undefined) throw missingInput(rule.inputs[slot]!, t + offset, inputs[slot]!.length);
      return value;
    };
    const next = step.next({ state: rows[t]!, parameters, input, t: rational(BigInt(t)) });
    if (next.some((value) => digitsOf(value) > mostDigits)) throw tooManyDigits(t + 1, mostDigits);
    rows.push([...next]);
  }
  const column = <T>(of: (value: Rational) => T, slot: number): T[] => rows.map((row) => of(row[slot]!));
  const byState = <T>(of: (slot: number) => T): Readonly<Record<string, T>> =>
    Object.fromEntries(rule.states.map((name, slot) => [name, of(slot)]));
  return {
    kind: "exact-trajectory",
    rule,
    periods,
    values: byState((slot) => column(rationalText, slot)),
    numbers: byState((slot) => Float64Array.from(column(toNumber, slot))),
  };
}
