import { joined, type Observations } from "../record/index.js";
import { noNewRowsError, unknownNameError } from "./errors.js";
import { type Fit, problemOf } from "./fit.js";
import { matchStates } from "./options/match-states.js";

/** How one estimate changed when rows were added. */
export interface EstimateChange {
  readonly group: string;
  readonly name: string;
  readonly was: number;
  readonly now: number;
  /** (now - was) in standard errors of the fit before; undefined where it had none. */
  readonly moved: number | undefined;
  readonly standardErrorWas: number | undefined;
  readonly standardErrorNow: number | undefined;
}

/** A fit brought up to date with rows that came in later. */
export interface UpdatedFit {
  readonly kind: "updated-fit";
  readonly fit: Fit;
  /** Rows added, by group. */
  readonly added: Readonly<Record<string, number>>;
  readonly changes: readonly EstimateChange[];
  /** A sentence for every estimate that moved by more than two of its standard errors. */
  readonly remarks: readonly string[];
}

/** Moves beyond this many standard errors are pointed out: common practice, no source. */
const notable = 2;

/**
 * Adds later rows of the record and fits again with the same options, from the estimates before.
 *
 * @param later - rows after those of the fit, read with the same options; groups are matched by name.
 * @throws {ModelError} `no-new-rows` | `rows-overlap` | `axes-differ` | `unknown-name` (a group that the fit does not have), and those of `fit`.
 * @example
 * const hourly = { period: "hour", step: { every: 1, of: "hour" }, value: "N" };
 * const early = fit(crowding, observations({ hour: [0, 1, 2, 3, 4, 5, 6], N: [10, 18, 31, 50, 69, 85, 93] }, hourly), { errors: "observation" });
 * updateFit(early, observations({ hour: [7, 8], N: [96, 99] }, hourly)).added[""]; // 2
 */
export function updateFit(before: Fit, later: Observations): UpdatedFit {
  const more = matchStates(before.rule, later);
  const known = before.observations.groups.map((group) => group.name);
  for (const { name } of more.groups) if (!known.includes(name)) throw unknownNameError(name, known, "group");
  const added: Record<string, number> = {};
  for (const name of known) added[name] = more.groups.find((each) => each.name === name)?.index.length ?? 0;
  if (Object.values(added).every((count) => count === 0)) throw noNewRowsError();
  const now = problemOf(before).refit({ observations: joined(before.observations, more) });
  const changes = before.groups.flatMap((was, g) => changesOf(was, now.groups[g]!));
  const remarks = changes
    .filter(({ moved }) => moved !== undefined && Math.abs(moved) > notable)
    .map(
      ({ group, name, was, now: is, moved }) =>
        `${name}${group && ` of ${group}`} moved from ${was.toPrecision(4)} to ${is.toPrecision(4)}, ${Math.abs(moved!).toFixed(1)} standard errors: check whether the rule still holds.`,
    );
  return { kind: "updated-fit", fit: now, added, changes, remarks };
}

function changesOf(was: Fit["groups"][number], now: Fit["groups"][number]): EstimateChange[] {
  return was.estimates.map((before, i) => {
    const after = now.estimates[i]!;
    const error = before.standardError;
    return {
      group: was.group,
      name: before.name,
      was: before.value,
      now: after.value,
      moved: error === undefined ? undefined : (after.value - before.value) / error,
      standardErrorWas: error,
      standardErrorNow: after.standardError,
    };
  });
}
