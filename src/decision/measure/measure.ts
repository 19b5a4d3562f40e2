import { type CrossedLevel, checkLevel, placeOf } from "../../projection/index.js";
import type { Rule } from "../../rule/index.js";
import { measureNameError, measureWindowError, quantileError } from "../errors.js";

/** Periods over which a measure is taken, counted from the present: 1 is the next one. Default: all. */
interface Window {
  readonly from?: number;
  readonly to?: number;
}

/** Which quantile of the paths is taken instead of their mean (of a time: instead of the median), as 0.95. */
interface Quantile {
  readonly quantile?: number;
}

/**
 * A number read off a projection. Names are states or quantities of the rule.
 *
 * `level`: the value `at` a period ahead. `average`, `total`, `lowest`, `highest`: over a window of periods. `share`:
 * of the periods of a window, those at or past a level. `time`: when a level is first reached, in the unit of the
 * period column. `probability`: the chance that it is reached within the window. `parameter`: a parameter of the rule
 * itself.
 *
 * A quantity belongs to the step that ends at its period: that of period k is worked out from the states at the end of
 * period k-1, while a state of period k is its value at the end of that period. So a cost that random demand of period 1
 * brings about is in the quantity of period 2.
 *
 * Where chance has a part, a measure is its mean over the paths (a time its median), or the `quantile` asked for.
 */
export type Measure =
  | ({
      readonly level: string;
      readonly at: number;
    } & Quantile)
  | ({ readonly average: string } & Window & Quantile)
  | ({ readonly total: string } & Window & Quantile)
  | ({ readonly lowest: string } & Window & Quantile)
  | ({ readonly highest: string } & Window & Quantile)
  | ({ readonly share: string } & CrossedLevel & Window & Quantile)
  | ({ readonly time: string } & CrossedLevel & Quantile)
  | ({ readonly probability: string } & CrossedLevel & Window)
  | { readonly parameter: string };

const kinds = [
  "level",
  "average",
  "total",
  "lowest",
  "highest",
  "share",
  "time",
  "probability",
  "parameter",
] as const;

/** What a measure does. */
export type MeasureKind = (typeof kinds)[number];

/** A measure taken apart and checked against a rule. */
export interface PlacedMeasure {
  readonly kind: MeasureKind;
  /** What it is taken of, and its place: among the parameters, or among the states and then the quantities. */
  readonly name: string;
  readonly place: number;
  /** First and last period ahead that count. */
  readonly first: number;
  readonly last: number;
  /** Of a share, time or probability. */
  readonly level: CrossedLevel | undefined;
  /** Asked for; undefined for the mean, and of a time for the median. */
  readonly quantile: number | undefined;
}

/** The kind of a measure and the name that it is taken of. */
export function measureOf(measure: Measure): { readonly kind: MeasureKind; readonly name: string } {
  const kind = kinds.find((each) => each in measure);
  if (kind === undefined) throw measureNameError("", kinds);
  return { kind, name: (measure as Readonly<Record<string, string>>)[kind] ?? "" };
}

/** Whether a measure is a number between 0 and 1 that only chance makes. */
export const isProbability = (measure: Measure): measure is Extract<Measure, { probability: string }> =>
  "probability" in measure;

/** Whether a measure is of a level that is reached. */
export const isOfLevel = (measure: Measure): measure is Measure & CrossedLevel =>
  "share" in measure || "time" in measure || isProbability(measure);

/**
 * Takes a measure apart.
 *
 * @param ahead - periods that the projection has.
 * @throws {ModelError} `unknown-name` | `outside-projection` | `quantile-outside` | `level-not-finite` | `level-beyond-bounds`.
 */
export function placedMeasure(measure: Measure, rule: Rule, ahead: number): PlacedMeasure {
  const { kind, name } = measureOf(measure);
  const place = kind === "parameter" ? rule.parameters.indexOf(name) : placeOf(rule, name);
  if (place < 0) throw measureNameError(name, rule.parameters);
  const { from = 1, to = ahead, quantile } = measure as Window & Quantile;
  const [first, last] = "at" in measure ? [measure.at, measure.at] : [from, to];
  const whole = Number.isInteger(first) && Number.isInteger(last);
  if (!(whole && first >= 1 && last <= ahead && first <= last)) throw measureWindowError(first, last, ahead);
  if (quantile !== undefined && !(quantile > 0 && quantile < 1)) throw quantileError(quantile);
  if (isOfLevel(measure)) checkLevel(rule, name, measure);
  return { kind, name, place, first, last, level: isOfLevel(measure) ? measure : undefined, quantile };
}
