import type { Fit, GroupFit } from "../../estimate/index.js";
import { type RandomStream, type RunHooks, randomStream, type Tick, ticker } from "../../numeric/index.js";
import { refuseExact } from "../refit/refuse-exact.js";
import { refuseFewRefits } from "../refusals.js";
import { type ErrorAdvice, errorAdvice } from "./error-advice.js";
import { type LackOfFit, lackOfFit } from "./lack-of-fit.js";
import { type Recovery, recovery } from "./recovery.js";
import { type ResidualTest, residualTests } from "./residual-tests.js";
import { concernsOf, verdictOf } from "./verdict.js";
import { type Window, windows } from "./windows.js";

/** Options of `check`. */
export interface CheckOptions extends RunHooks {
  /** Records drawn from the fit and refitted, at least 50; default 200. */
  readonly resamples?: number;
  /** Seed of the random numbers, a whole number; default that of the case, else 1. */
  readonly seed?: number;
}

type Settled = Required<Pick<CheckOptions, "resamples" | "seed">>;

/** The checks of one group. */
export interface GroupCheck {
  readonly group: string;
  readonly tests: readonly ResidualTest[];
  readonly windows: readonly Window[];
  readonly lackOfFit: readonly LackOfFit[];
  /** Undefined for fits to counts, censored values and groups together. */
  readonly recovery: Recovery | undefined;
  /** Undefined where the other kind of error could not be fitted. */
  readonly errors: ErrorAdvice | undefined;
  /** What speaks against the fit, as whole sentences; empty where nothing does. */
  readonly concerns: readonly string[];
  readonly sentence: string;
}

/** A fit looked at from all sides. */
export interface Check {
  readonly kind: "check";
  readonly fit: Fit;
  readonly options: Settled;
  readonly groups: readonly GroupCheck[];
  readonly sentence: string;
}

/** Fewer refits tell coverage too roughly to be read. */
const leastRefits = 50;
/** Records drawn with each kind of error, for the advice. */
const adviceDraws = 60;

/**
 * Looks for what speaks against a fit: tests of its residuals, how much its ends and its window decide, its misfit
 * against replicates, whether refits of records drawn from it find its parameters again (bias, and the share of
 * intervals that hold the truth), and whether the scatter lies in the reading or in the change.
 *
 * @returns per group the single checks, and what they come to in words.
 * @throws {ModelError} `refits-too-few` | `exact-fit`.
 * @example check(fit(crowding, counts, { errors: "observation" })).sentence;
 */
export function check(fit: Fit, options: CheckOptions = {}): Check {
  const settings = { resamples: options.resamples ?? 200, seed: options.seed ?? 1 };
  if (!Number.isInteger(settings.resamples) || settings.resamples < leastRefits)
    throw refuseFewRefits(settings.resamples, leastRefits);
  refuseExact(fit);
  const tick = ticker(options, fit.groups.length * (settings.resamples + 2 * adviceDraws));
  let stream = randomStream(settings.seed);
  const groups = fit.groups.map((group) => {
    const own = stream;
    stream = stream.jump();
    return groupCheck(fit, group, settings.resamples, own, tick);
  });
  const named = (group: GroupCheck): string => (group.group === "" ? "" : `${group.group}: `);
  const sentence = groups.map((group) => `${named(group)}${group.sentence}`).join(" ");
  return {
    kind: "check",
    fit,
    options: settings,
    groups,
    sentence,
  };
}

function groupCheck(fit: Fit, group: GroupFit, refits: number, stream: RandomStream, tick: Tick): GroupCheck {
  const found = {
    group: group.group,
    tests: residualTests(fit, group, stream.jump()),
    windows: windows(fit, group),
    lackOfFit: lackOfFit(fit, group),
    recovery: recovery(fit, group, refits, stream, tick),
    errors: errorAdvice(fit, group, adviceDraws, stream, tick),
  };
  const concerns = concernsOf(fit, group, found);
  return { ...found, concerns, sentence: verdictOf(group, found, concerns) };
}
