import { nearestNames } from "../numeric/index.js";
import type { ObservationOptions } from "./observation-options.js";
import { optionMissing, optionUnknown, optionWrong } from "./refusals.js";

type Option = keyof ObservationOptions;

/** Options that take one of a few words. */
const choices: Partial<Record<Option, readonly string[]>> = {
  disorder: ["refuse", "sort"],
  offStep: ["refuse", "nearest"],
};

/** Options that take the name of a column, or a text. */
const texts: readonly Option[] = ["value", "replicates", "weight", "order"];

const known: readonly string[] = [
  ...Object.keys(choices),
  ...texts,
  ...["period", "step", "values", "unit", "by", "where", "rows", "censored"],
  ...["measured", "inputs", "duplicates", "identities"],
];

/**
 * Refuses options that would otherwise be passed over or misread.
 *
 * @throws {ModelError} `option-missing` | `option-unknown` | `option-wrong`.
 */
export function checkOptions(options: ObservationOptions): void {
  if (options?.period === undefined)
    throw optionMissing("period", 'Name the period column: period: "month".');
  const given = Object.entries(options) as [Option, unknown][];
  for (const [option, value] of given) {
    if (!known.includes(option)) throw optionUnknown(option, known, nearestNames(option, known));
    if (value === undefined) continue;
    const words = choices[option];
    if (words && !words.includes(String(value)))
      throw optionWrong(option, value, `one of ${words.join(", ")}`);
    if (texts.includes(option) && typeof value !== "string") throw optionWrong(option, value, "a text");
  }
}
