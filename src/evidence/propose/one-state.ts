import type { Observations } from "../../record/index.js";
import { refuseSeveralStates } from "../refusals.js";

/** The record with one of its states alone. */
export function oneState(observations: Observations, state: string | undefined): Observations {
  const names = observations.states.map(({ name }) => name);
  const wanted = state ?? (names.length === 1 ? names[0] : undefined);
  if (wanted === undefined || !names.includes(wanted)) throw refuseSeveralStates(names, state);
  if (names.length === 1) return observations;
  return {
    ...observations,
    states: observations.states.filter(({ name }) => name === wanted),
    groups: observations.groups.map((group) => ({ ...group, values: { [wanted]: group.values[wanted]! } })),
  };
}
