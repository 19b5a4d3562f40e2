import type { Observations as EngineObservations } from "../../src/record/index.js";
import { attach } from "./attach.js";
import { noRecordedValueError, severalGroupsError, unknownGroupError, unknownValueError } from "./errors.js";

/** A record made ready for rules: groups of values by whole steps, with what was found on the way. */
export interface Observations extends EngineObservations {
  /**
   * The last recorded value of a state, in its unit; with several groups that of the group named, as in
   * `last("N", "flask A")`. Left out of listings and copies of the record.
   */
  readonly last: (state: string, group?: string) => number;
}

/** Gives a record the shortcut to its last values. */
export function withLast(record: EngineObservations): Observations {
  return attach(record, { last: (state: string, group?: string) => lastOf(record, state, group) });
}

function lastOf({ groups }: EngineObservations, state: string, wanted: string | undefined): number {
  const names = groups.map((group) => group.name);
  const [first = ""] = names;
  if (wanted === undefined && names.length > 1)
    throw severalGroupsError("record", `last("${state}")`, names, `last("${state}", "${first}")`);
  const group = groups.find(({ name }) => wanted === undefined || name === String(wanted));
  if (group === undefined) throw unknownGroupError("record", String(wanted), names);
  const values = Object.hasOwn(group.values, state) ? group.values[state] : undefined;
  if (values === undefined) throw unknownValueError("record", state, Object.keys(group.values));
  const last = values.filter(Number.isFinite).at(-1);
  if (last === undefined) throw noRecordedValueError(state, group.name);
  return last;
}
