import type { Warning } from "../../src/numeric/index.js";

/** A group of a result with its warnings. */
interface Warned {
  readonly group: string;
  readonly warnings: readonly Warning[];
}

/**
 * The warnings of all groups as notes, one that several groups share said once: "A, B: ...".
 *
 * @example cautionsByGroup([{ group: "A", warnings: [{ code: "x", message: "Near a bound." }] }]); // ["Caution: A: Near a bound."]
 */
export function cautionsByGroup(groups: readonly Warned[]): string[] {
  const names = new Map<string, string[]>();
  for (const { group, warnings } of groups) {
    for (const { message } of warnings) names.set(message, [...(names.get(message) ?? []), group]);
  }
  return [...names].map(([message, who]) => {
    const named = who.filter((name) => name !== "").join(", ");
    return `Caution: ${named === "" ? "" : `${named}: `}${message}`;
  });
}
