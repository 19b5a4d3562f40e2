/**
 * An interval in words; an end that the record does not limit is left open.
 *
 * @param lower, upper - ends already written as text; undefined = no limit on that side.
 * @param unit - written once, behind the interval; "" = none.
 * @example interval("0.39", "0.47", "per month"); // "0.39 to 0.47 per month"
 */
export function interval(lower: string | undefined, upper: string | undefined, unit = ""): string {
  const suffix = unit === "" ? "" : ` ${unit}`;
  if (lower !== undefined && upper !== undefined) return `${lower} to ${upper}${suffix}`;
  if (lower !== undefined) return `at least ${lower}${suffix}`;
  return upper === undefined ? "without limit on either side" : `at most ${upper}${suffix}`;
}
