import { ambiguousGroupError, severalGroupsError, unknownGroupError } from "./errors.js";

/** A group of a result, or a scenario of one. */
interface Part {
  readonly group: string;
  readonly scenario?: string;
}

/** How a group and its scenario are named together: "flask A, rate 5%". */
export function groupName({ group, scenario = "" }: Part): string {
  return [group, scenario].filter((part) => part !== "").join(", ");
}

/** The only group of a result; `member` is what was asked of it. */
export function onlyGroup<Group extends Part>(what: string, member: string, groups: readonly Group[]): Group {
  const [only] = groups;
  if (only !== undefined && groups.length === 1) return only;
  const names = groups.map(groupName);
  throw severalGroupsError(what, member, names, `group("${names[0]}").${member}`);
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
