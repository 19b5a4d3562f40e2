import type { GroupForecast } from "../../projection/index.js";
import { plain, rounded } from "../words/amount.js";

/** Says where on the axis of periods a row of a path lies: "hour 129.3", or by dates where the record has them. */
export interface TimeWords {
  /** "at hour 129.3"; "at 2027-04-30"; "between 2027-03-31 and 2027-04-30". */
  readonly at: (row: number, spread?: number) => string;
  /** A limit: "125.1" or a date; the row is rounded down or up to a whole period where there are dates. */
  readonly limit: (row: number, side: "lower" | "upper", spread?: number) => string;
  /** A whole period: "hour 156" or "2027-04-30". */
  readonly period: (row: number) => string;
}

export function timeWords({ time, labels }: GroupForecast, periodUnit: string): TimeWords {
  const first = time[0]!;
  const step = time.length > 1 ? time[1]! - first : 1;
  const number = (row: number): number => first + row * step;
  const label = (row: number): string => labels![Math.min(Math.max(row, 0), labels!.length - 1)]!;
  if (labels === undefined)
    return {
      at: (row, spread) => `at ${periodUnit} ${rounded(number(row), scaled(spread, step))}`,
      limit: (row, _, spread) => rounded(number(row), scaled(spread, step)),
      period: (row) => `${periodUnit} ${plain(number(row), 6)}`,
    };
  return {
    at: (row) => {
      const whole = Math.round(row);
      if (Math.abs(row - whole) < 1e-9) return `at ${label(whole)}`;
      return `between ${label(Math.floor(row))} and ${label(Math.ceil(row))}`;
    },
    limit: (row, side) => label(side === "lower" ? Math.floor(row) : Math.ceil(row)),
    period: (row) => label(row),
  };
}

function scaled(spread: number | undefined, step: number): number | undefined {
  return spread === undefined ? undefined : spread * step;
}
