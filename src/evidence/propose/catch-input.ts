import type { Observations } from "../../record/index.js";

/** The input of the harvest rules. */
export const catchSymbol = "C";

/** A record whose inputs the harvest rules can read. */
export interface CatchInput {
  readonly record: Observations;
  /** The recorded name of the input that was taken as the catch; undefined where none was renamed. */
  readonly takenFrom: string | undefined;
}

/** The record with its only input under the name by which the harvest rules read the catch; else as it is. */
export function catchInput(record: Observations): CatchInput {
  const [only] = record.inputs;
  if (only === undefined || record.inputs.length > 1 || only === catchSymbol)
    return { record, takenFrom: undefined };
  const groups = record.groups.map(({ withoutValue, ...group }) => ({
    ...group,
    inputs: { [catchSymbol]: group.inputs[only]! },
    ...(withoutValue && {
      withoutValue: { ...withoutValue, inputs: { [catchSymbol]: withoutValue.inputs[only]! } },
    }),
  }));
  return { record: { ...record, inputs: [catchSymbol], groups }, takenFrom: only };
}
