import { type Fit, type FitOptions, problemOf } from "../../estimate/index.js";
import { type RunHooks, type Tick, ticker } from "../../numeric/index.js";
import type { Observations } from "../../record/index.js";
import { ruleLabel } from "../../rule/index.js";
import type { ErrorAdvice } from "../check/error-advice.js";
import { refuseExact } from "../refit/refuse-exact.js";
import { refuseNothingFits } from "../refusals.js";
import { adviceDraws, adviceOn } from "./advice-on.js";
import { candidatesFor, type NotTried } from "./candidates.js";
import { catchInput, catchSymbol } from "./catch-input.js";
import { holdOut } from "./hold-out.js";
import { oneState } from "./one-state.js";
import { proposalWords } from "./proposal-words.js";
import { type Standing, supportedRules } from "./supported-rules.js";
import { type Tried, tryRules } from "./try-rules.js";

/** Options of `propose`; others are those of a fit. */
export interface ProposeOptions extends Omit<FitOptions, "errors" | "intervals">, RunHooks {
  /** Name of the state; default the only one. */
  readonly state?: string;
  /** Where the error lies; without it both are tried, and the record says which, or that it cannot. */
  readonly errors?: "process" | "observation";
  /** Seed of the random numbers, a whole number; default that of the case, else 1. */
  readonly seed?: number;
}

/** A rule that was tried on a record. */
export interface ProposedRule {
  /** In the catalogue: `rules[name]`. */
  readonly name: string;
  /** What the rule is called. */
  readonly rule: string;
  readonly errors: "process" | "observation";
  readonly parameters: number;
  readonly aicCorrected: number;
  /** Above the lowest with the same kind of error. */
  readonly difference: number;
  /** Mean ranked probability score on the last fifth, fitted to the rows before it; undefined where not computed. */
  readonly heldOut: number | undefined;
  readonly supported: boolean;
  /** Parameters that the record does not determine; filled for supported rules. */
  readonly undetermined: readonly string[];
  /** Why it is not supported; "" where it is. */
  readonly reason: string;
}

/** The catalogue tried on a record. */
export interface Proposal {
  readonly kind: "proposal";
  /** Supported rules first, then by AICc. */
  readonly rows: readonly ProposedRule[];
  readonly notTried: readonly NotTried[];
  readonly errors: "process" | "observation" | "undecided";
  readonly advice: ErrorAdvice | undefined;
  /** Best score of a naive forecast on the last fifth. */
  readonly naiveHeldOut: { readonly name: string; readonly score: number } | undefined;
  readonly verdict: {
    readonly kind: "supported" | "undecided" | "none-adequate";
    /** By their names in the catalogue. */
    readonly rules: readonly string[];
  };
  /** Fits of the supported rules, with intervals, ready for `check`, `compare` and `forecast`. */
  readonly fits: readonly Fit[];
  readonly sentence: string;
  readonly notes: readonly string[];
}

/**
 * Tries the catalogue on a record: fits every rule that one state can identify, with errors in the process and in the
 * observation, and says which are supported, that they cannot be told apart, or that none is adequate.
 *
 * Having looked at many is priced in three ways: a rule must be ahead of every naive rule by 4 in AICc, leads below 4
 * are no evidence, and a supported rule must not forecast the last fifth of the record, which it was not fitted to,
 * clearly worse than a naive forecast.
 *
 * A record with a single input is read with it as the catch, "C", of the harvest rules.
 *
 * @throws {ModelError} `several-states` | `nothing-fits` | `exact-fit`.
 * @example propose(counts, { distribution: "lognormal" }).verdict.kind; // "undecided"
 */
export function propose(observations: Observations, options: ProposeOptions = {}): Proposal {
  const { state, errors, seed = 1, onProgress, signal, ...others } = options;
  const { record, takenFrom } = catchInput(oneState(observations, state));
  const positive = record.groups.every((group) =>
    Object.values(group.values)[0]!.every((value) => value > 0),
  );
  const { candidates, left } = candidatesFor(record.inputs);
  const usable = candidates.filter((candidate) => positive || candidate.anyLevel);
  const kinds = errors === undefined ? (["process", "observation"] as const) : [errors];
  const tick = ticker(options, usable.length * kinds.length + (errors === undefined ? 4 * adviceDraws : 0));
  const { tried, failed } = tryRules(usable, record, kinds, others, tick);
  if (tried.length === 0) throw refuseNothingFits(failed[0]?.reason ?? "no rule suits its levels");
  for (const { fit } of tried) refuseExact(fit);
  const barred = candidates.filter((candidate) => !usable.includes(candidate));
  const notTried = [
    ...barred.map(({ name }) => ({ name, reason: "speaks of positive levels only" })),
    ...failed,
    ...left,
  ];
  const assumedNormal = others.distribution === undefined;
  return judged({ record, takenFrom, assumedNormal, tried, seed, errors, notTried, tick });
}

interface Trial {
  readonly record: Observations;
  readonly takenFrom: string | undefined;
  /** Whether no distribution was given. */
  readonly assumedNormal: boolean;
  readonly tried: readonly Tried[];
  readonly notTried: readonly NotTried[];
  readonly errors: ProposeOptions["errors"];
  readonly seed: number;
  readonly tick: Tick;
}

function judged({ record, takenFrom, assumedNormal, tried, notTried, errors, seed, tick }: Trial): Proposal {
  const advice = errors === undefined ? adviceOn(tried, seed, tick) : undefined;
  const chosen = errors ?? advice?.kind ?? "undecided";
  const kinds = chosen === "undecided" ? (["process", "observation"] as const) : [chosen];
  const standings = kinds.flatMap((kind) => supportedRules(tried.filter((each) => each.errors === kind)));
  const held = holdOut(standings);
  const judgedRows = standings.map((standing, i) => rowOf(standing, held?.scores[i], held?.beatenBy[i]));
  const rows = judgedRows
    .sort((a, b) => Number(b.supported) - Number(a.supported) || a.difference - b.difference)
    .map((row) => withFit(row, tried));
  const names = [...new Set(rows.filter(({ row }) => row.supported).map(({ row }) => row.name))];
  const kind = names.length === 0 ? "none-adequate" : names.length === 1 ? "supported" : "undecided";
  const result = {
    rows: rows.map(({ row }) => row),
    notTried,
    errors: chosen,
    advice,
    naiveHeldOut: held?.naive,
    verdict: { kind, rules: names } as const,
    fits: rows.flatMap(({ fit }) => (fit ? [fit] : [])),
  };
  const told = names.length > 0 ? tried.filter(({ name }) => names.includes(name)) : tried;
  const unread = record.inputs
    .filter((input) => !told.some(({ fit }) => fit.rule.inputs.includes(input)))
    .map((input) => (input === catchSymbol ? (takenFrom ?? input) : input));
  const words = proposalWords(result, {
    tried: tried.length,
    heldOut: held?.values,
    takenFrom,
    unread,
    assumedNormal,
  });
  return { kind: "proposal", ...result, ...words };
}

function rowOf(standing: Standing, heldOut: number | undefined, beatenBy: string | undefined): ProposedRule {
  const { tried, difference, reason } = standing;
  const beaten =
    beatenBy === undefined ? reason : `clearly worse than "${beatenBy}" on the last fifth, held out`;
  return {
    name: tried.name,
    rule: ruleLabel(tried.fit.rule),
    errors: tried.errors,
    parameters: tried.unknowns,
    aicCorrected: tried.aicCorrected,
    difference,
    heldOut,
    supported: beaten === "",
    undetermined: [],
    reason: beaten,
  };
}

/** A supported rule with its fit done again with intervals, which tell the parameters that are not determined. */
function withFit(
  row: ProposedRule,
  tried: readonly Tried[],
): { readonly row: ProposedRule; readonly fit?: Fit } {
  const { fit } = tried.find((each) => each.name === row.name && each.errors === row.errors)!;
  if (!row.supported) return { row };
  const whole = problemOf(fit).refit({ intervals: "profile" });
  const open = whole.groups.flatMap((group) =>
    group.estimates
      .filter((estimate) => estimate.standardError === undefined)
      .map((estimate) => estimate.name),
  );
  return { row: { ...row, undetermined: [...new Set(open)] }, fit: whole };
}
