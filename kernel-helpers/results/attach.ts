import { severalGroupsError } from "./errors.js";
import { groupName, groupNamed, type Part } from "./group-named.js";

/**
 * Adds members to a result that its listings, copies and transfers do not meet: a result goes to a worker, into JSON
 * or into a comparison as the plain data that it is.
 *
 * @returns the same result; what it already has stays, and one that somebody froze before stays as it is.
 * @example attach({ kind: "note" }, { length: 4 }).length; // 4
 */
export function attach<T extends object, Members extends object>(result: T, members: Members): T & Members {
  for (const [name, value] of Object.entries(members)) define(result, name, { value });
  return result as T & Members;
}

/**
 * Gives a result the members of its only group, and `group(name)`. With several groups each member is an error that
 * says what to write.
 */
export function attachGroups<Group extends Part>(
  result: object,
  what: string,
  groups: readonly Group[],
  members: readonly (keyof Group & string)[],
): void {
  const [only] = groups;
  for (const member of members)
    if (only !== undefined && groups.length === 1) define(result, member, { value: only[member] });
    else define(result, member, { get: () => refuse(what, groups, member) });
  attach(result, { group: (name: string) => groupNamed(what, groups, name) });
}

function refuse(what: string, groups: readonly Part[], member: string): never {
  const names = groups.map(groupName);
  throw severalGroupsError(what, member, names, `group("${names[0]}").${member}`);
}

function define(result: object, name: string, member: PropertyDescriptor): void {
  if (Object.isExtensible(result) && !Object.hasOwn(result, name))
    Object.defineProperty(result, name, member);
}
