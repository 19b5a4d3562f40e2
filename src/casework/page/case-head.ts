import { joined, type ShownNotebook, type ShownOutput } from "./shown-notebook.js";

/** MIME types by which a case says what it asks and what it answers; both hold JSON. */
const caseType = "application/vnd.periodwise.case+json";
const answerType = "application/vnd.periodwise.answer+json";

/** What stands at the top of a page. */
export interface CaseHead {
  readonly title: string | undefined;
  readonly question: string | undefined;
  readonly about: string | undefined;
  readonly answers: readonly string[];
}

/** Reads a notebook's title, question and answers from what its cells put out. */
export function caseHead(notebook: ShownNotebook): CaseHead {
  const outputs = notebook.cells.flatMap((cell) => cell.outputs ?? []);
  const opened = outputs.map((output) => jsonOf(output, caseType)).find((found) => found !== undefined);
  return {
    title: text(opened, "title") ?? firstHeading(notebook),
    question: text(opened, "question"),
    about: text(opened, "about"),
    answers: outputs
      .map((output) => text(jsonOf(output, answerType), "sentence"))
      .filter((said) => said !== undefined),
  };
}

/** Whether an output only says what the head of the page says already. */
export function opensCase(output: ShownOutput): boolean {
  return jsonOf(output, caseType) !== undefined;
}

function jsonOf(output: ShownOutput, type: string): object | undefined {
  const found = output.data?.[type];
  return typeof found === "object" && found !== null ? found : undefined;
}

function text(from: object | undefined, name: string): string | undefined {
  const found = from && (from as Record<string, unknown>)[name];
  return typeof found === "string" && found.trim() !== "" ? found : undefined;
}

function firstHeading(notebook: ShownNotebook): string | undefined {
  for (const cell of notebook.cells) {
    const heading = cell.cell_type === "markdown" ? /^#\s+(.+)$/m.exec(joined(cell.source)) : null;
    if (heading) return heading[1]?.replace(/[*_`]/g, "");
  }
  return undefined;
}
