import {
  calendarAxis,
  indexOf,
  inputByPeriod,
  labelAt,
  numberAxis,
  type Observations,
  type ObservedGroup,
  type PeriodAxis,
  type StepLength,
} from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import { groupUnknown, periodMissing, startUnreadable } from "../refusals.js";
import type { InitialValues } from "../setting/setting.js";
import type { InputPlans } from "./input-plan.js";
import { nothingRecorded, plannedInputs } from "./planned-inputs.js";

/** Where the run of a rule begins, and what its periods are called. */
export interface StartOptions {
  /**
   * The first period: a number, a label such as "2026-03-31" where `period` names a unit of time, or a period
   * of the record; default the last recorded one, else 0.
   */
  readonly startsAt?: number | string;
  /** What a period is: "month", or a step such as `{ every: 12, of: "hour" }`; default "period". */
  readonly period?: string | StepLength;
  /** A record (or a fit) to go on from: its dates, its inputs so far, and its last values where `initial` has none. */
  readonly record?: Observations | { readonly observations: Observations };
  /** Of a fit or a record with several groups: which one. */
  readonly group?: string;
}

/** The start of a run, by the index of a period on the axis; the index is `t` in the rule. */
export interface RunStart {
  readonly from: number;
  readonly axis: PeriodAxis;
  /** The group that is gone on from; undefined without a record. */
  readonly recorded: ObservedGroup | undefined;
}

/** @throws {ModelError} `start-not-readable` | `unknown-name` (of a group), and those of a period column. */
export function runStart(options: StartOptions): RunStart {
  const { startsAt = 0, period = "period", record, group } = options;
  if (record !== undefined)
    return startInRecord("observations" in record ? record.observations : record, options.startsAt, group);
  const every = typeof period === "string" ? 1 : period.every;
  const place = Number(startsAt) / every;
  if (Number.isNaN(place)) {
    if (period === "period") throw periodMissing(String(startsAt));
    return { from: 0, axis: calendarAxis(String(startsAt), period), recorded: undefined };
  }
  const isIndex = Number.isInteger(place) && place >= 0;
  const axis = numberAxis(isIndex ? 0 : place * every, period);
  return { from: isIndex ? place : 0, axis, recorded: undefined };
}

function startInRecord(
  { groups }: Observations,
  startsAt: number | string | undefined,
  name: string | undefined,
): RunStart {
  const recorded = groups.find((each) => each.name === (name ?? groups[0]!.name));
  if (recorded === undefined || (name === undefined && groups.length > 1))
    throw groupUnknown(
      name,
      groups.map((each) => each.name),
    );
  const { axis, index } = recorded;
  const from = startsAt === undefined ? index[index.length - 1] : indexOf(axis, startsAt);
  if (from === undefined || from < 0)
    throw startUnreadable(startsAt, `is no period of the record, which begins at ${labelAt(axis, 0)}`);
  return { from, axis, recorded };
}

/** First values: those given, and where there are none those recorded in the first period and before it. */
export function initialFrom(
  rule: Rule,
  { from, recorded }: RunStart,
  given: InitialValues = {},
): InitialValues {
  if (recorded === undefined) return given;
  const known = rule.states.flatMap((state): [string, number[]][] => {
    const lags = rule.lags.filter((kept) => kept.state === state).length;
    const places = Array.from({ length: lags + 1 }, (_, i) => recorded.index.indexOf(from - lags + i));
    const values = recorded.values[state];
    return values === undefined || places.includes(-1) ? [] : [[state, places.map((at) => values[at]!)]];
  });
  return { ...Object.fromEntries(known), ...given };
}

/** The inputs of a run: recorded up to its first period where it goes on from a record, planned from there on. */
export function inputsFrom(
  rule: Rule,
  start: RunStart,
  periods: number,
  plans: InputPlans,
): readonly Float64Array[] {
  const { axis, from, recorded } = start;
  return plannedInputs(rule, plans, {
    axis,
    group: recorded?.name,
    recorded: recorded === undefined ? nothingRecorded : (input) => inputByPeriod(recorded, input),
    from,
    first: recorded === undefined ? from : from + 1,
    last: from + periods,
  });
}
