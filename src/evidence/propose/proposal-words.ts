import type { Proposal, ProposedRule } from "./propose.js";
import { aheadOfNaive, supportedWithin } from "./supported-rules.js";

type Found = Omit<Proposal, "kind" | "sentence" | "notes">;

/** What was done for a proposal, besides its result. */
export interface Effort {
  /** Fits tried. */
  readonly tried: number;
  /** Values held out. */
  readonly heldOut: number | undefined;
  /** The recorded input that was taken as the catch under another name. */
  readonly takenFrom: string | undefined;
  /** Recorded inputs that no rule named in the answer reads. */
  readonly unread: readonly string[];
  /** Whether no distribution was given. */
  readonly assumedNormal: boolean;
}

/** What a proposal comes to, as a client would be told, and the price of having looked at many. */
export function proposalWords(
  found: Found,
  { tried, heldOut, takenFrom, unread, assumedNormal }: Effort,
): Pick<Proposal, "sentence" | "notes"> {
  const notes = [
    `${tried} fits were tried. Among so many the best owes part of its lead to chance: leads below ${supportedWithin} in AICc are no evidence, and a rule must be ${aheadOfNaive} ahead of "no change" and "mean level".`,
    ...(assumedNormal ? [normalNote] : []),
    ...takenNote(takenFrom),
    ...adviceNote(found),
    ...heldOutNote(found, heldOut),
  ];
  return { sentence: `${sentenceOf(found)}${unreadWords(unread)}`, notes };
}

const normalNote =
  'No distribution was given, so errors are normal with the same standard deviation at every level, as in `fit`. Where the scatter grows with the level, give distribution: "lognormal".';

function takenNote(takenFrom: string | undefined): string[] {
  if (takenFrom === undefined) return [];
  return [
    `The only recorded input, "${takenFrom}", was taken as the catch C of the harvest rules; the fits handed on hold it as C.`,
  ];
}

function unreadWords(unread: readonly string[]): string {
  if (unread.length === 0) return "";
  const names = unread.map((name) => `"${name}"`).join(", ");
  return ` Left out of this answer: the recorded ${unread.length === 1 ? "input" : "inputs"} ${names}.`;
}

function adviceNote({ advice, errors }: Found): string[] {
  if (advice !== undefined) return [advice.sentence];
  return errors === "undecided"
    ? [
        "Where the error lies is left open: rules that explain the record about as well speak for different places.",
      ]
    : [];
}

function sentenceOf({ rows, verdict, errors }: Found): string {
  if (verdict.kind === "none-adequate") {
    const [closest] = rows;
    const reason = closest === undefined ? "" : ` The closest, ${closest.rule}, is ${closest.reason}.`;
    return `None adequate: no rule of the catalogue explains the record better than a forecast without a rule.${reason}`;
  }
  const supported = rows.filter((row) => row.supported);
  const open = openOf(supported);
  const kind = errors === "undecided" ? "the record does not tell where the error lies" : placeOf(errors);
  const called = [...new Set(supported.map(({ rule }) => rule))];
  const told =
    verdict.kind === "supported"
      ? `The record supports the rule ${called[0]}`
      : `The record does not tell the rules ${called.slice(0, -1).join(", ")} and ${called[called.length - 1]} apart`;
  const next = verdict.kind === "supported" ? "Check it before it is used" : "Carry all of them forward";
  return `${told} (${kind}).${open} ${next}.`;
}

function placeOf(errors: "process" | "observation"): string {
  return errors === "process" ? "error in the change itself" : "error in the reading";
}

function openOf(rows: readonly ProposedRule[]): string {
  const open = rows.filter((row) => row.undetermined.length > 0);
  return open
    .map((row) => ` It does not determine ${row.undetermined.join(", ")} of the rule ${row.rule}.`)
    .join("");
}

function heldOutNote({ rows, naiveHeldOut }: Found, values: number | undefined): string[] {
  const scored = rows.filter((row) => row.heldOut !== undefined);
  if (naiveHeldOut === undefined || scored.length === 0) return [];
  const best = scored.reduce((low, next) => (next.heldOut! < low.heldOut! ? next : low));
  const better = best.heldOut! < naiveHeldOut.score ? "better" : "no better";
  return [
    `Held out: fitted without the last fifth, ${best.rule} forecast its ${values} values with score ${best.heldOut!.toPrecision(3)}, ${better} than "${naiveHeldOut.name}" with ${naiveHeldOut.score.toPrecision(3)} (lower is better).`,
  ];
}
