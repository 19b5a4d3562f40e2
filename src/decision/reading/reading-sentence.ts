import { percent, plain } from "../words/amount.js";
import type { NextReading } from "./next-reading.js";

/**
 * Which reading helps, by how much, and what is to be said of its time.
 *
 * @param about - the answer in words; "" between rivals.
 */
export function readingSentence(
  found: Omit<NextReading, "kind" | "sentence">,
  about: string,
  rules: number,
): string {
  const { recommended: best, replicates, periodUnit, state, purpose, choices } = found;
  const what = replicates === 1 ? `A reading of ${state}` : `${replicates} readings of ${state}`;
  const at = `at ${periodUnit} ${plain(best.time, 6)}`;
  const among = choices.length === 1 ? "" : ` of the ${choices.length} times looked at`;
  const error = `Monte-Carlo error ${percent(best.error, best.error / 3)}`;
  const said =
    purpose === "narrow the answer"
      ? `${what} ${at} helps most${among}: it is expected to narrow the margin of ${about} by ${percent(best.gain, best.error)} (${error}), if the rule holds.`
      : `${what} ${at} tells the ${rules} rules apart best${among}: evidence of ${plain(best.gain, 2)} units is expected (Monte-Carlo error ${plain(best.error, 1)}), and ${percent(best.telling!, 0.01)} of such readings would favour the right rule by more than 2.`;
  return `${said}${recordNote(found)}${lateNote(found)}`;
}

/** That a time within the record needs a sample that was kept. */
function recordNote({ recommended, periodUnit }: Omit<NextReading, "kind" | "sentence">): string {
  if (!recommended.withinRecord) return "";
  return ` ${periodUnit.charAt(0).toUpperCase()}${periodUnit.slice(1)} ${plain(recommended.time, 6)} lies within the record, so only a sample that was kept can still be read.`;
}

/** That readings after the event come too late for it. */
function lateNote({
  choices,
  recommended,
  event,
  periodUnit,
}: Omit<NextReading, "kind" | "sentence">): string {
  const late = choices.filter(({ tooLate }) => tooLate).length;
  if (late === 0 || event === undefined) return "";
  const when = `${periodUnit} ${plain(event, 4)}`;
  if (recommended.tooLate)
    return ` All these times come after the event itself, expected at ${when}: such a reading is too late to act on before it.`;
  return ` ${late} of the ${choices.length} times come after the event itself, expected at ${when}, and are too late for it.`;
}
