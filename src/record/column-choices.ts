import { nearestNames } from "../numeric/index.js";
import type { DuplicateChoice, Measured, ObservationOptions } from "./observation-options.js";
import type { ObservedState } from "./observations.js";
import { columnNotUsed, levelsAddedUp, optionWrong } from "./refusals.js";

const kinds: readonly string[] = ["level", "flow"];
const duplicateChoices: readonly string[] = ["refuse", "average", "sum", "first", "last"];

/** What an option says of one column: under its name in the rules, or its name in the record. */
export interface ColumnChoice {
  readonly name: string;
  readonly column: string;
  /** Undefined for an input of which it is not stated. */
  readonly measured: Measured | undefined;
  /** What becomes of the cells of a doubled period, and why. */
  readonly doubled: DuplicateChoice;
  readonly doubledWhy: string;
}

/**
 * How each state and input is measured, and what becomes of its cells where a period has several rows: a level takes
 * what was chosen, a flow is added up unless its own column was given another choice.
 *
 * @throws {ModelError} `option-wrong` when an option names no column in use, or adds up a column stated to be a level.
 */
export function columnChoices(
  states: readonly Omit<ObservedState, "measured">[],
  inputs: readonly (readonly [string, string])[],
  { measured = "level", duplicates = "refuse" }: ObservationOptions,
): readonly ColumnChoice[] {
  const unstated = typeof measured === "string" ? measured : "level";
  const used = [
    ...states.map(({ name, column }) => ({ name, column, unstated })),
    ...inputs.map(([name, column]) => ({ name, column, unstated: undefined })),
  ];
  checkNames("measured", measured, used, kinds);
  checkNames("duplicates", duplicates, used, duplicateChoices);
  return used.map(({ name, column, unstated }) => {
    const stated = ofColumn(measured, name, column);
    const asked = ofColumn(duplicates, name, column) ?? duplicates;
    if (stated === "level" && asked === "sum") throw levelsAddedUp(column);
    const kind = stated ?? unstated;
    const doubled = ofColumn(duplicates, name, column) ?? doubledBy(duplicates, kind);
    const doubledWhy =
      doubled === asked ? `duplicates: "${doubled}"` : `${column} is a flow, and flows are added up`;
    return { name, column, measured: kind, doubled, doubledWhy };
  });
}

function doubledBy(
  duplicates: NonNullable<ObservationOptions["duplicates"]>,
  measured: Measured | undefined,
): DuplicateChoice {
  if (duplicates === "refuse") return "refuse";
  if (measured === "flow") return "sum";
  return typeof duplicates === "string" ? duplicates : "refuse";
}

function ofColumn<T>(
  choices: string | Readonly<Record<string, T>>,
  name: string,
  column: string,
): T | undefined {
  if (typeof choices === "string") return undefined;
  const key = [name, column].find((each) => Object.hasOwn(choices, each));
  return key === undefined ? undefined : choices[key];
}

function checkNames(
  option: string,
  choices: string | Readonly<Record<string, string>>,
  used: readonly { readonly name: string; readonly column: string }[],
  words: readonly string[],
): void {
  const known = [...new Set(used.flatMap(({ name, column }) => [name, column]))];
  const given = typeof choices === "string" ? [] : Object.entries(choices);
  for (const word of typeof choices === "string" ? [choices] : given.map(([, word]) => word))
    if (!words.includes(word)) throw optionWrong(option, word, `one of ${words.join(", ")}`);
  for (const [name] of given)
    if (!known.includes(name)) throw columnNotUsed(option, name, known, nearestNames(name, known));
}
