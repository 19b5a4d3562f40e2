import { type CrossedLevel, type Level, levelSide } from "../../projection/index.js";
import { amount, percent, plain, withinError } from "../words/amount.js";
import { isOfLevel, isProbability, type Measure, measureOf } from "./measure.js";

/** What a measure's words need besides. */
export interface MeasureUnits {
  readonly unitOf: (name: string) => string;
  readonly periodUnit: string;
  /** A time of the period column: "month 120", or a label where periods have them; to no more digits than its error allows. */
  readonly timeWords: (time: number, error?: number) => string;
  /** A level relative to a parameter or a first value as a number, at the estimates. */
  readonly levelAt: (level: CrossedLevel) => number;
  /** Whether the paths are moved by chance, so that a measure is one of their distribution. */
  readonly random: boolean;
}

/** A measure in words: "the average of stock over the next 26 weeks". */
export function measureWords(measure: Measure, units: MeasureUnits): string {
  const { kind, name } = measureOf(measure);
  const quantile = "quantile" in measure ? measure.quantile : undefined;
  if (kind === "parameter") return name;
  if (kind === "probability")
    return `the probability that ${reachWords(name, measure as CrossedLevel, units)}${windowWords(measure, units)}`;
  const of = quantile === undefined ? "" : `the ${plain(100 * quantile, 4)}% quantile of `;
  if (kind === "time") {
    const median = quantile === undefined && units.random ? "the median time" : "the time";
    return `${of}${median} at which ${reachWords(name, measure as CrossedLevel, units)}`;
  }
  if ("level" in measure) return `${of}${name} ${measure.at} ${plural(units.periodUnit, measure.at)} ahead`;
  if (kind === "share") {
    const side = levelSide(measure as CrossedLevel).sign < 0 ? "below" : "above";
    return `${of}the share of ${plural(units.periodUnit, 2)} with ${name} at or ${side} ${levelWords(measure as CrossedLevel, name, units)}${windowWords(measure, units)}`;
  }
  return `${of}the ${kind} of ${name}${windowWords(measure, units)}`;
}

/** "owed falls to 0 EUR". */
export function reachWords(name: string, asked: CrossedLevel, units: MeasureUnits): string {
  const verb = levelSide(asked).sign < 0 ? "falls" : "rises";
  return `${name} ${verb} to ${levelWords(asked, name, units)}`;
}

/** "0 EUR"; "90% of K (1404 t)"; "6 log10 below N[0] (0.012 cfu/g)". */
export function levelWords(
  asked: CrossedLevel,
  name: string,
  { unitOf, levelAt }: Pick<MeasureUnits, "unitOf" | "levelAt">,
): string {
  const { level, sign } = levelSide(asked);
  if (typeof level === "number") return amount(plain(level, 12), unitOf(name));
  return `${relativeWords(level, sign)} (${amount(plain(levelAt(asked), 4), unitOf(name))})`;
}

function relativeWords(level: Exclude<Level, number>, sign: 1 | -1): string {
  if ("share" in level) return `${plain(100 * level.share, 6)}% of ${level.of}`;
  return `${plain(level.logs, 6)} log10 ${sign < 0 ? "below" : "above"} ${level.of}`;
}

function windowWords(measure: Measure, { periodUnit }: MeasureUnits): string {
  const { from, to } = measure as { readonly from?: number; readonly to?: number };
  if (from === undefined && to === undefined) return "";
  if (to === undefined) return ` from ${periodUnit} ${from} ahead on`;
  if ((from ?? 1) === 1) return ` within ${to} ${plural(periodUnit, to)}`;
  return ` over ${plural(periodUnit, 2)} ${from} to ${to} ahead`;
}

/** "week" or "weeks". */
export function plural(unit: string, count: number): string {
  return count === 1 || unit.endsWith("s") ? unit : `${unit}s`;
}

/** A measure with its value, as the main clause of a sentence: "owed falls to 0 EUR at month 120". */
export function measuredClause(measure: Measure, value: number, error: number, units: MeasureUnits): string {
  const { kind, name } = measureOf(measure);
  const said = measuredWords(measure, value, error, units);
  if (kind !== "time" || !Number.isFinite(value) || units.random || hasQuantile(measure))
    return `${measureWords(measure, units)} is ${said}`;
  return `${reachWords(name, measure as CrossedLevel, units)} at ${said}`;
}

const hasQuantile = (measure: Measure): boolean => "quantile" in measure && measure.quantile !== undefined;

/** A measure's value as a sentence writes it. */
export function measuredWords(measure: Measure, value: number, error: number, units: MeasureUnits): string {
  if (Number.isNaN(value)) return "not known, as no path stays within its range";
  if (isProbability(measure)) return value === 0 ? "none in the paths drawn" : percent(value, error);
  const { kind, name } = measureOf(measure);
  if (kind === "share") return percent(value, error);
  if (value === Number.POSITIVE_INFINITY) return "never within the projection";
  if (kind === "time") return units.timeWords(value, error);
  return amount(withinError(value, error, 5), units.unitOf(name));
}

/** A Monte-Carlo error in the unit of what it is of: "0.2%", "0.3 months", "12 EUR". */
export function errorWords(measure: Measure, error: number, units: MeasureUnits): string {
  const { kind, name } = measureOf(measure);
  if (kind === "share" || kind === "probability") return percent(error, error / 3);
  if (kind === "time") return `${plain(error, 1)} ${plural(units.periodUnit, 2)}`;
  return amount(plain(error, 1), units.unitOf(name));
}

/** What a measure is counted in: the period's unit for a time, nothing for a share or a probability. */
export function measureUnit(measure: Measure, { unitOf, periodUnit }: MeasureUnits): string {
  const { kind, name } = measureOf(measure);
  if (kind === "time") return periodUnit;
  return isOfLevel(measure) ? "" : unitOf(name);
}
