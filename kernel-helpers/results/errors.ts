import { ModelError, nearestNames } from "../../src/numeric/index.js";

const shown = 8;

/** "A, B and C", quoted as they would be typed; a long list is cut. */
function listed(names: readonly string[]): string {
  const quoted = names.slice(0, shown).map((name) => `"${name}"`);
  if (names.length > shown) return `${quoted.join(", ")} and ${names.length - shown} more`;
  return quoted.length < 2
    ? quoted.join("")
    : `${quoted.slice(0, -1).join(", ")} and ${quoted[quoted.length - 1]}`;
}

function suggestion(name: string, known: readonly string[]): string {
  const [nearest] = nearestNames(name, known);
  return nearest === undefined ? "" : ` Did you mean "${nearest}"?`;
}

/** A shortcut that speaks of one group, asked of a result with several; `instead` is what to write for one of them. */
export function severalGroupsError(
  what: string,
  member: string,
  names: readonly string[],
  instead: string,
): ModelError {
  return new ModelError(
    "several-groups",
    `\`.${member}\` needs a single group, and this ${what} has ${names.length}: ${listed(names)}. ` +
      `Write \`.${instead}\` for one of them, or loop over \`.groups\`.`,
    { member, groups: names },
  );
}

/** A question that takes the estimates of one group, asked of a fit with several. */
export function groupRequiredError(names: readonly string[]): ModelError {
  return new ModelError(
    "group-required",
    `This fit has ${names.length} groups: ${listed(names)}. Say which one is meant: \`group: "${names[0]}"\`.`,
    { groups: names },
  );
}

export function unknownGroupError(what: string, name: string, names: readonly string[]): ModelError {
  const known = names.every((each) => each === "")
    ? "It has a single group without a name: leave `.group(...)` out."
    : `It has ${listed(names)}.${suggestion(name, names)}`;
  return new ModelError("unknown-group", `This ${what} has no group "${name}". ${known}`, {
    name,
    groups: names,
  });
}

export function ambiguousGroupError(what: string, name: string, names: readonly string[]): ModelError {
  return new ModelError(
    "ambiguous-group",
    `"${name}" names ${names.length} groups of this ${what}: ${listed(names)}. Write one of these in full.`,
    { name, groups: names },
  );
}

export function unknownValueError(
  what: string,
  name: string,
  known: readonly string[],
  more = "",
): ModelError {
  return new ModelError(
    "unknown-name",
    `This ${what} has no "${name}". It has ${listed(known)}.${suggestion(name, known)}${more}`,
    { name, known },
  );
}

export function noIntervalError(name: string, value: number): ModelError {
  return new ModelError(
    "held-parameter",
    `${name} was held at ${value} and not estimated, so it has no interval. Leave it out of \`fixed\` to estimate it.`,
    { name, value },
  );
}

export function noRecordedValueError(name: string, group: string): ModelError {
  return new ModelError(
    "no-recorded-value",
    `No value of "${name}"${group && ` in group "${group}"`} is recorded, so there is no last one.`,
    { name, group },
  );
}
