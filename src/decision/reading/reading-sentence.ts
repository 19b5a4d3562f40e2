import { percent, plain } from "../words/amount.js";
import type { NextReading } from "./next-reading.js";

type Found = Omit<NextReading, "kind" | "sentence">;

/**
 * Which reading helps, by how much, and what is to be said of its time.
 *
 * @param say - a time in words.
 * @param about - the answer in words; "" between rivals.
 */
export function readingSentence(
  found: Found,
  say: (time: number) => string,
  about: string,
  rules: number,
): string {
  const { recommended: best, replicates, state, purpose, choices } = found;
  const what = replicates === 1 ? `A reading of ${state}` : `${replicates} readings of ${state}`;
  const at = `at ${say(best.time)}`;
  const among = choices.length === 1 ? "" : ` of the ${choices.length} times looked at`;
  const error = `Monte-Carlo error ${percent(best.error, best.error / 3)}`;
  const said =
    purpose === "narrow the answer"
      ? `${what} ${at} helps most${among}: it is expected to narrow the margin of ${about} by ${percent(best.gain, best.error)} (${error}), if the rule holds.`
      : `${what} ${at} tells the ${rules} rules apart best${among}: evidence of ${plain(best.gain, 2)} units is expected (Monte-Carlo error ${plain(best.error, 1)}), and ${percent(best.telling!, 0.01)} of such readings would favour the right rule by more than 2.`;
  return `${said}${recordNote(found, say)}${lateNote(found, say)}`;
}

/** That a time within the record needs a sample that was kept. */
function recordNote({ recommended }: Found, say: (time: number) => string): string {
  if (!recommended.withinRecord) return "";
  const time = say(recommended.time);
  return ` ${time.charAt(0).toUpperCase()}${time.slice(1)} lies within the record, so only a sample that was kept can still be read.`;
}

/** That readings after the event come too late for it. */
function lateNote({ choices, recommended, event }: Found, say: (time: number) => string): string {
  const late = choices.filter(({ tooLate }) => tooLate).length;
  if (late === 0 || event === undefined) return "";
  if (recommended.tooLate)
    return ` All these times come after the event itself, expected at ${say(event)}: such a reading is too late to act on before it.`;
  return ` ${late} of the ${choices.length} times come after the event itself, expected at ${say(event)}, and are too late for it.`;
}
