import type { ObservedGroup } from "../../record/index.js";
import type { Unknowns } from "./unknowns.js";

/** The unknowns of several groups fitted together: parameters once, all else a group. */
export interface SharedUnknowns {
  readonly all: Unknowns;
  /** By group: for each of its own unknowns its number among all. */
  readonly maps: readonly Int32Array[];
}

/** Lays the unknowns of groups together; an initial state is named after its group: "N[0] of flask A". */
export function sharedUnknowns(groups: readonly ObservedGroup[], own: readonly Unknowns[]): SharedUnknowns {
  const first = own[0]!;
  const parameters = first.roles.filter((role) => role === "parameter").length;
  const others = first.names.length - parameters;
  const picks = [
    ...Array.from({ length: parameters }, (_, k) => ({ g: 0, k })),
    ...groups.flatMap((_, g) => Array.from({ length: others }, (_, k) => ({ g, k: parameters + k }))),
  ];
  const all: Unknowns = {
    ...first,
    names: picks.map(({ g, k }) =>
      k < parameters ? first.names[k]! : `${first.names[k]} of ${groups[g]!.name}`,
    ),
    roles: picks.map(({ k }) => first.roles[k]!),
    columns: Int32Array.from(picks, ({ k }) => first.columns[k]!),
    rooted: picks.map(({ k }) => first.rooted[k]!),
    lower: Float64Array.from(picks, ({ g, k }) => own[g]!.lower[k]!),
    upper: Float64Array.from(picks, ({ g, k }) => own[g]!.upper[k]!),
  };
  const maps = groups.map((_, g) =>
    Int32Array.from(first.names, (_, k) => (k < parameters ? k : parameters + g * others + (k - parameters))),
  );
  return { all, maps };
}
