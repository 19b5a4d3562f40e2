import type { GroupForecast } from "../../projection/index.js";
import { percent, plain, rounded } from "../words/amount.js";
import type { FirstPeriod } from "./group-passages.js";

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

/** A first period with at most this share of the paths is not named beside the likeliest. */
const worthNaming = 0.05;

/** Most rivals that are named beside the likeliest first period. */
const mostNamed = 3;

/**
 * The likeliest first periods with their chances: "month 36 (61%; month 35 39%)". Undefined where the one on the path
 * at the estimates has no rival worth naming.
 */
export function likeliestWords(
  group: GroupForecast,
  periodUnit: string,
  distribution: readonly FirstPeriod[],
  central: number | undefined,
): string | undefined {
  const { paths } = group.ensemble;
  const ranked = [...distribution].sort((a, b) => b.share - a.share);
  const likely = ranked.filter(({ share }) => share > worthNaming);
  const [first = ranked[0], ...rivals] = likely;
  if (first === undefined || (rivals.length === 0 && (first.row === central || central === undefined)))
    return undefined;
  const say = timeWords(group, periodUnit);
  const chance = (share: number): string => percent(share, Math.sqrt((share * (1 - share)) / paths));
  const named = rivals.slice(0, mostNamed);
  const rest = ranked.slice(1 + named.length).reduce((sum, { share }) => sum + share, 0);
  const others = rest > worthNaming ? [`others ${chance(rest)}`] : [];
  const beside = [...named.map(({ row, share }) => `${say.period(row)} ${chance(share)}`), ...others];
  return `${say.period(first.row)} (${[chance(first.share), beside.join(", ")].filter((each) => each !== "").join("; ")})`;
}
