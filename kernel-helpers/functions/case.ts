import { resetPlotLibrary, startPictureWorker } from "../figures/index.js";
import { checkCall } from "../options/index.js";
import {
  type Bundle,
  escapeHtml,
  showing,
  superscript,
  theme,
  typeface,
  untypeset,
} from "../tables/index.js";
import { type CaseHead, caseLog, defaultSeed } from "./case-log.js";
import { cautionOf, type Domain } from "./cautions.js";
import { refuseEmptyAnswer, refuseNoCase, refuseUnanswered } from "./refusals.js";
import { rerunBlock } from "./rerun-block.js";
import { type Shown, show } from "./show.js";
import { shownTogether } from "./shown-together.js";

/** What a case begins with. */
export interface CaseOptions {
  /** Title of the case. */
  readonly title: string;
  /** The question, in the client's words. */
  readonly question: string;
  /** Field of the case, which decides the caution that is printed. */
  readonly domain: Domain;
  /** Seed of every random number in the notebook, a whole number; it is shown; default 1. */
  readonly seed?: number;
  /** Date of the case, printed as given. */
  readonly date?: string;
}

/**
 * Opens a case: prints its title and question, and sets the seed that the commands draw with.
 *
 * @example openCase({ title: "Algae line 3", question: "When can it be drawn down?", domain: "cultures", seed: 7 });
 */
export function openCase(options: CaseOptions): void {
  checkCall("openCase", arguments);
  const head: CaseHead = { ...options, seed: options.seed ?? defaultSeed };
  caseLog.open(head);
  resetPlotLibrary();
  startPictureWorker();
  const under = [
    `Field: ${options.domain}`,
    `seed ${head.seed}`,
    ...(options.date ? [options.date] : []),
  ].join(" · ");
  show(
    block(
      `<p style="margin:0;font-size:20px;font-weight:600">${escapeHtml(head.title)}</p>` +
        `<p style="margin:.3em 0;font-size:16px">${escapeHtml(head.question)}</p>` +
        `<p style="margin:0;color:${theme.mutedText};font-size:13px">${escapeHtml(under)}</p>`,
      `${head.title}\n${head.question}\n${under}`,
      {
        "application/vnd.periodwise.case+json": { title: head.title, question: head.question, about: under },
      },
    ),
  );
}

/**
 * States the answer of the case: one plain sentence with number, unit, margin and condition.
 *
 * The sentence is also what `npm start` prints for the notebook.
 *
 * @throws {ModelError} `no-case-open` | `empty-answer`.
 * @example answer(`Draw down at hour 138. ${ready.sentence}`);
 */
export function answer(sentence: string): void {
  checkCall("answer", arguments);
  const said = superscript(sentence);
  if (caseLog.head() === undefined) throw refuseNoCase("answer(...)");
  if (said.trim() === "") throw refuseEmptyAnswer();
  caseLog.noteAnswer(said);
  const cautions = caseLog.cautions();
  const html =
    `<p style="margin:0;color:${theme.mutedText};font-size:13px;font-weight:600">Answer</p>` +
    answerParts(said) +
    cautions.map((text) => `<p style="margin:.4em 0 0">Caution: ${escapeHtml(text)}</p>`).join("");
  show(
    showing({ kind: "answer", sentence: said }, () => ({
      "application/vnd.periodwise.answer+json": { sentence: said, cautions },
      "text/html": boxed(html),
      "text/plain": [`Answer: ${said}`, ...cautions.map((text) => `Caution: ${text}`)].join("\n"),
    })),
  );
}

/** The first sentence is what the client reads; the rest holds its margins and conditions. */
function answerParts(answer: string): string {
  const [, first = answer, rest = ""] = /^(.+?[.!?])\s+(?=\p{Lu})(.*)$/su.exec(answer) ?? [];
  const more = rest === "" ? "" : `<p style="margin:.3em 0 0;font-size:14px">${escapeHtml(rest)}</p>`;
  return `<p style="margin:.2em 0 0;font-size:17px;font-weight:600">${escapeHtml(first)}</p>${more}`;
}

/**
 * Closes the case: limits and caution, then all that a colleague needs to rerun it to the same digits.
 *
 * @throws {ModelError} `no-case-open` | `case-not-answered`.
 * @example closeCase();
 */
export function closeCase(): void {
  checkCall("closeCase", arguments);
  const head = caseLog.head();
  if (head === undefined) throw refuseNoCase("closeCase()");
  if (caseLog.answers().length === 0) throw refuseUnanswered();
  const caution = cautionOf(head.domain as Domain);
  const limits = block(
    `<p style="margin:0;font-weight:600">Limits and caution</p><p style="margin:.3em 0 0">${escapeHtml(caution)}</p>`,
    `Limits and caution\n${caution}`,
  );
  show(showing({ kind: "case-end" }, () => shownTogether([limits, rerunBlock()])));
}

function block(html: string, text: string, more: Bundle = {}): Shown {
  return showing({ kind: "block" }, () => ({ ...more, "text/html": boxed(html), "text/plain": text }));
}

function boxed(html: string): string {
  const style = `border-left:4px solid ${theme.accent};background:${theme.shaded};color:${theme.text};padding:.8em 1.1em;margin:.6em 0;font-family:${typeface};line-height:1.45;max-width:60em;overflow-wrap:anywhere`;
  return `<div class="pw-block ${untypeset}" dir="auto" style="${style}">${html}</div>`;
}
