import { normalQuantile, studentQuantile } from "../../numeric/index.js";
import type { Rule } from "../../rule/index.js";
import { type Interval, waldInterval } from "../intervals/interval.js";
import type { Profile } from "../intervals/profile-interval.js";
import type { Optimum } from "../search/optimum.js";
import type { UnknownRole, Unknowns } from "../unknowns/unknowns.js";

/** One unknown of a fit. */
export interface Estimate {
  /** The parameter's name, or "N[0]" for an initial state. */
  readonly name: string;
  readonly role: UnknownRole;
  readonly unit: string;
  readonly value: number;
  /** Undefined where the record does not determine it. */
  readonly standardError: number | undefined;
  readonly profile: Interval;
  /** Absent where the profile is so lopsided that a symmetric interval would mislead. */
  readonly wald: Interval | undefined;
  /** By increasing value: the increase over the optimum, in units of sigma^2; cut by `cut`. */
  readonly trace: Profile["trace"];
}

/** How an unknown is reported: a variance by its root, anything else as it is. */
const reported = (rooted: boolean, value: number): number => (rooted ? Math.sqrt(value) : value);

/** The estimates of an optimum, by unknown; Wald intervals by t where degrees of freedom are given, else normal. */
export function estimatesOf(
  rule: Rule,
  unknowns: Unknowns,
  found: Optimum,
  level: number,
  degreesOfFreedom: number | undefined,
): readonly Estimate[] {
  const tail = (1 + level) / 2;
  const reach =
    degreesOfFreedom === undefined ? normalQuantile(tail) : studentQuantile(tail, degreesOfFreedom);
  return unknowns.names.map((name, i) => {
    const rooted = unknowns.rooted[i]!;
    const value = reported(rooted, found.at[i]!);
    return {
      name,
      role: unknowns.roles[i]!,
      unit: rule.units[name] ?? "",
      value,
      ...(found.stop.kind === "failed" ? notKnown(level) : known(found, i, value, rooted, reach, level)),
    };
  });
}

type Precision = Pick<Estimate, "standardError" | "profile" | "wald" | "trace">;

/** A search that failed ends nowhere that an error could be put on. */
const notKnown = (level: number): Precision => ({
  standardError: undefined,
  profile: noInterval(level, "the search failed"),
  wald: undefined,
  trace: [],
});

function known(
  found: Optimum,
  i: number,
  value: number,
  rooted: boolean,
  reach: number,
  level: number,
): Precision {
  const size = found.at.length;
  const error = Math.sqrt(found.covariance[i * size + i]!) / (rooted ? 2 * value : 1);
  const standardError = found.determined[i] && Number.isFinite(error) ? error : undefined;
  const profile = found.profiles?.[i];
  return {
    standardError,
    profile: profile === undefined ? noInterval(level, "not asked for") : intervalOf(profile, rooted, level),
    wald: isNearParabola(found.at[i]!, profile)
      ? waldInterval(value, standardError, reach, level)
      : undefined,
    trace: (profile?.trace ?? []).map((at) => ({ ...at, value: reported(rooted, at.value) })),
  };
}

/** Sides of a profile whose lengths differ by more than this factor are no parabola: common practice, no source. */
const lopsided = 1.5;

/** Whether a symmetric interval says about what the profile says. */
function isNearParabola(at: number, profile: Profile | undefined): boolean {
  if (profile?.lower === undefined || profile.upper === undefined) return profile === undefined;
  const ratio = (profile.upper - at) / (at - profile.lower);
  return ratio < lopsided && ratio > 1 / lopsided;
}

function intervalOf({ lower, upper, note }: Profile, rooted: boolean, level: number): Interval {
  const limit = (value: number | undefined): number | undefined =>
    value !== undefined && Number.isFinite(value) ? reported(rooted, value) : undefined;
  const limits = { lower: limit(lower), upper: limit(upper) };
  // No interval has no width: where both ends meet, no profile could be followed.
  if (limits.lower !== undefined && limits.lower === limits.upper)
    return noInterval(level, "its profile cannot be followed");
  return { kind: "profile", level, ...limits, note };
}

function noInterval(level: number, note: string): Interval {
  return { kind: "profile", level, lower: undefined, upper: undefined, note };
}
