import { type CrossedLevel, levelSide } from "../../projection/index.js";
import { amount, percent, plain } from "../words/amount.js";

/** Periods over which a measure is taken, counted from the present: 1 is the next one. Default: all. */
interface Window {
  readonly from?: number;
  readonly to?: number;
}

/**
 * A number read off a projection. Names are states or quantities of the rule.
 *
 * `level`: a state `at` a period ahead. `average`, `total`, `lowest`, `highest`: over a window of periods. `time`: when
 * a state first rises or falls to a level, in the unit of the period column. `probability`: the chance that it ever
 * does within the projection. `parameter`: a parameter of the rule itself.
 */
export type Measure =
  | { readonly level: string; readonly at: number }
  | ({ readonly average: string } & Window)
  | ({ readonly total: string } & Window)
  | ({ readonly lowest: string } & Window)
  | ({ readonly highest: string } & Window)
  | ({ readonly time: string } & CrossedLevel)
  | ({ readonly probability: string } & CrossedLevel)
  | { readonly parameter: string };

/** What a measure does, with the name it is taken of. */
export type MeasureKind =
  | "level"
  | "average"
  | "total"
  | "lowest"
  | "highest"
  | "time"
  | "probability"
  | "parameter";

const kinds: readonly MeasureKind[] = [
  "level",
  "average",
  "total",
  "lowest",
  "highest",
  "time",
  "probability",
  "parameter",
];

/** The kind of a measure and the name that it is taken of. */
export function measureOf(measure: Measure): { readonly kind: MeasureKind; readonly name: string } {
  const kind = kinds.find((each) => each in measure) ?? "level";
  return { kind, name: (measure as Readonly<Record<string, string>>)[kind] ?? "" };
}

/** Whether a measure needs many paths. */
export const isProbability = (measure: Measure): measure is Extract<Measure, { probability: string }> =>
  "probability" in measure;

/** Units that a measure's words need. */
export interface MeasureUnits {
  readonly unitOf: (name: string) => string;
  readonly periodUnit: string;
  /** A time of the period column: "month 120", or a label where periods have them. */
  readonly timeWords: (time: number) => string;
}

/** A measure in words: "the average of stock over the next 26 weeks". */
export function measureWords(measure: Measure, units: MeasureUnits): string {
  const { kind, name } = measureOf(measure);
  if ("level" in measure) return `${name} ${measure.at} ${plural(units.periodUnit, measure.at)} ahead`;
  if (kind === "parameter") return name;
  if ("time" in measure) return `the time at which ${reachWords(name, measure, units)}`;
  if ("probability" in measure) return `the probability that ${reachWords(name, measure, units)}`;
  return `the ${kind} of ${name}${windowWords(measure as Window, units)}`;
}

/** "owed falls to 0 EUR". */
export function reachWords(name: string, level: CrossedLevel, { unitOf }: MeasureUnits): string {
  const { value, sign } = levelSide(level);
  return `${name} ${sign < 0 ? "falls" : "rises"} to ${amount(plain(value, 12), unitOf(name))}`;
}

function windowWords({ from, to }: Window, { periodUnit }: MeasureUnits): string {
  if (from === undefined && to === undefined) return "";
  if (to === undefined) return ` from ${periodUnit} ${from} ahead on`;
  return ` over ${plural(periodUnit, 2)} ${from ?? 1} to ${to} ahead`;
}

/** "week" or "weeks". */
export function plural(unit: string, count: number): string {
  return count === 1 || unit.endsWith("s") ? unit : `${unit}s`;
}

/** A measure with its value, as the main clause of a sentence: "owed falls to 0 EUR at month 120". */
export function measuredClause(measure: Measure, value: number, error: number, units: MeasureUnits): string {
  const { kind, name } = measureOf(measure);
  const said = measuredWords(measure, value, error, units);
  if (kind === "time")
    return `${reachWords(name, measure as Extract<Measure, { time: string }>, units)} at ${said}`;
  return `${measureWords(measure, units)} is ${said}`;
}

/** A measure's value as a sentence writes it. */
export function measuredWords(measure: Measure, value: number, error: number, units: MeasureUnits): string {
  if (isProbability(measure)) return value === 0 ? "none in the draws made" : percent(value, error);
  const { kind, name } = measureOf(measure);
  if (kind === "time") return units.timeWords(value);
  return amount(plain(value, 5), units.unitOf(name));
}
