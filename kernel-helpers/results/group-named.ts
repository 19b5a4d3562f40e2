import { ambiguousGroupError, unknownGroupError } from "./errors.js";

/** A group of a result, or a scenario of one. */
export interface Part {
  readonly group: string;
  readonly scenario?: string;
}

/** How a group and its scenario are named together: "flask A, rate 5%". */
export function groupName({ group, scenario = "" }: Part): string {
  return [group, scenario].filter((part) => part !== "").join(", ");
}

/** The group of a name: that of the group, of the scenario, or both as "flask A, rate 5%". */
export function groupNamed<Group extends Part>(what: string, groups: readonly Group[], asked: string): Group {
  const name = String(asked);
  const whole = groups.filter((each) => groupName(each) === name);
  const found =
    whole.length > 0 ? whole : groups.filter(({ group, scenario }) => [group, scenario].includes(name));
  const [only] = found;
  if (only === undefined) throw unknownGroupError(what, name, groups.map(groupName));
  if (found.length > 1) throw ambiguousGroupError(what, name, found.map(groupName));
  return only;
}
