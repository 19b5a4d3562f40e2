import type { GroupReach, Reach } from "./reaches.js";

/** The answer in words: number, unit, interval, what the interval carries, and on what it stands. */
export function reachSentence(
  answer: Omit<GroupReach, "sentence">,
  question: Omit<Reach, "kind" | "groups" | "sentence">,
): string {
  const { state, unit, value, periodUnit, level, margin } = question;
  const who = answer.group === "" ? state : `${state} of ${answer.group}`;
  const target = unit === "" ? `${value}` : `${value} ${unit}`;
  const percent = `${Number((100 * level).toPrecision(12))}%`;
  const never = neverWords(answer);
  if (answer.time === undefined || answer.firstPeriod === undefined)
    return `${who} does not reach ${target} by ${periodUnit} ${short(answer.horizon)} on the fitted path${never}.`;
  const lower = answer.lower === undefined ? undefined : short(answer.lower, spread(answer));
  const upper = answer.upper === undefined ? undefined : short(answer.upper, spread(answer));
  const interval =
    upper === undefined
      ? `${percent} interval from ${periodUnit} ${lower ?? "unknown"} with no upper limit by ${periodUnit} ${short(answer.horizon)}`
      : `${percent} interval ${lower} to ${upper}`;
  return (
    `${who} reaches ${target} at ${periodUnit} ${short(answer.time, spread(answer))} (${interval}, carrying the uncertainty of ` +
    `the ${margin}); the first recorded ${periodUnit} at or past it is ${short(answer.firstPeriod)}${never}.`
  );
}

function neverWords(answer: Omit<GroupReach, "sentence">): string {
  if (answer.never === 0) return "";
  const error = answer.neverError.toPrecision(1);
  return `; it never gets there within the forecast in a share of ${answer.never.toFixed(decimals(answer.neverError))} of draws (Monte-Carlo error ${error})`;
}

/** Width of the interval, which decides the digits. */
function spread(answer: Omit<GroupReach, "sentence">): number | undefined {
  if (answer.lower === undefined || answer.upper === undefined) return undefined;
  return (answer.upper - answer.lower) / 4;
}

/** Rounded so that the uncertainty shows two digits; without one, to at most four. */
function short(value: number, uncertainty?: number): string {
  if (uncertainty === undefined || !(uncertainty > 0)) return `${Number(value.toPrecision(4))}`;
  return value.toFixed(decimals(uncertainty));
}

function decimals(uncertainty: number): number {
  if (!(uncertainty > 0)) return 3;
  return Math.min(12, Math.max(0, 1 - Math.floor(Math.log10(uncertainty))));
}
