import { escapeHtml } from "../../../kernel-helpers/wording/index.js";
import { type CaseHead, caseHead, isOmitted } from "./case-head.js";
import { figureLibrary } from "./figure-library.js";
import { markdownHtml } from "./markdown-html.js";
import { outputsHtml } from "./output-html.js";
import { pageStyle } from "./page-style.js";
import { joined, type ShownCell, type ShownNotebook } from "./shown-notebook.js";

/** Options of a page. */
export interface PageOptions {
  /** Title of a notebook without an open case and without a heading. Default "Case". */
  readonly title?: string;
  /** File name of the notebook, printed at the end. */
  readonly source?: string;
}

/** Nothing is fetched, whatever an output requests; figures need inline scripts and pictures as data. */
const policy =
  "default-src 'none'; style-src 'unsafe-inline'; script-src 'unsafe-inline'; img-src data: blob:; font-src data:";

/**
 * An executed notebook as one self-contained HTML file: title and question, then the answer, then the notebook with its
 * code folded. Figures are interactive on screen and pictures on paper.
 *
 * @param notebook - nbformat 4.5, with outputs; it is not changed.
 * @returns the same text for the same notebook.
 * @example writePage({ cells: [{ cell_type: "markdown", source: "# Ferry loan" }] });
 */
export function writePage(notebook: ShownNotebook, options: PageOptions = {}): string {
  const head = caseHead(notebook);
  const title = head.title ?? options.title ?? "Case";
  const body = notebook.cells.map((cell) => cellHtml(cell, title)).join("\n");
  return [
    '<!doctype html>\n<html lang="en"><head><meta charset="utf-8">',
    `<meta http-equiv="Content-Security-Policy" content="${policy}">`,
    '<meta name="viewport" content="width=device-width,initial-scale=1">',
    `<title>${escapeHtml(title)}</title><style>${pageStyle}</style></head><body><main>`,
    headHtml(head, title),
    body,
    options.source ? `<footer>Notebook: ${escapeHtml(options.source)}</footer>` : "",
    `</main>${body.includes('class="pw-figure') ? figureLibrary() : ""}</body></html>\n`,
  ].join("\n");
}

function headHtml({ question, about, answers }: CaseHead, title: string): string {
  const answerParts = answers.map(answerHtml).join("");
  return [
    `<header><h1 dir="auto">${escapeHtml(title)}</h1>`,
    question ? `<p class="question" dir="auto">${escapeHtml(question)}</p>` : "",
    about ? `<p class="about" dir="auto">${escapeHtml(about)}</p>` : "",
    answerParts ? `<section class="answer" aria-label="Answer"><b>Answer</b>${answerParts}</section>` : "",
    "</header>",
  ].join("");
}

/** The first sentence is set large; intervals and conditions follow it. */
function answerHtml({ sentence, cautions }: CaseHead["answers"][number]): string {
  const [, first = sentence, rest = ""] = /^(.+?[.!?])\s+(?=\p{Lu})(.*)$/su.exec(sentence) ?? [];
  const more = [...(rest === "" ? [] : [rest]), ...cautions.map((caution) => `Caution: ${caution}`)];
  return [
    `<p dir="auto">${escapeHtml(first)}</p>`,
    ...more.map((text) => `<p class="rest" dir="auto">${escapeHtml(text)}</p>`),
  ].join("");
}

function cellHtml(cell: ShownCell, title: string): string {
  const source = joined(cell.source);
  if (cell.cell_type === "markdown") return markdownHtml(withoutTitle(source, title), cell.attachments);
  if (cell.cell_type !== "code") return `<pre>${escapeHtml(source)}</pre>`;
  const step = cell.execution_count ? ` of cell ${cell.execution_count}` : "";
  const code =
    source.trim() === ""
      ? ""
      : `<details class="code"><summary>Code${step}</summary><pre>${escapeHtml(source)}</pre></details>`;
  return code + outputsHtml((cell.outputs ?? []).filter((output) => !isOmitted(output)));
}

/** A first heading that is the title of the page, or starts with it ("Ferry loan: ..."), is not repeated. */
function withoutTitle(source: string, title: string): string {
  const heading = /^#\s+(.+)\n*/.exec(source);
  const words = heading?.[1]?.replace(/[*_`]/g, "") ?? "";
  const repeats = words.startsWith(title) && !/^[\p{L}\p{N}]/u.test(words.slice(title.length));
  return heading && repeats ? source.slice(heading[0].length) : source;
}
