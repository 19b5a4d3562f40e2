import { joined, type ShownNotebook, type ShownOutput } from "./shown-notebook.js";

/** MIME types of outputs with a special place on the page; all contain JSON. */
const caseType = "application/vnd.periodwise.case+json";
const progressType = "application/vnd.periodwise.progress+json";
const answerType = "application/vnd.periodwise.answer+json";

/** The head of a page. */
export interface CaseHead {
  readonly title: string | undefined;
  readonly question: string | undefined;
  readonly about: string | undefined;
  readonly answers: readonly { readonly sentence: string; readonly cautions: readonly string[] }[];
}

/** Reads title, question and answers from the outputs of a notebook. */
export function caseHead(notebook: ShownNotebook): CaseHead {
  const outputs = notebook.cells.flatMap((cell) => cell.outputs ?? []);
  const caseData = outputs.map((output) => jsonOf(output, caseType)).find((found) => found !== undefined);
  return {
    title: text(caseData, "title") ?? firstHeading(notebook),
    question: text(caseData, "question"),
    about: text(caseData, "about"),
    answers: outputs.flatMap((output) => {
      const answer = jsonOf(output, answerType);
      const sentence = text(answer, "sentence");
      return sentence === undefined ? [] : [{ sentence, cautions: texts(answer, "cautions") }];
    }),
  };
}

/** Whether an output is omitted from a page: it is shown in the head, or it is a progress line. */
export function isOmitted(output: ShownOutput): boolean {
  return jsonOf(output, caseType) !== undefined || jsonOf(output, progressType) !== undefined;
}

function jsonOf(output: ShownOutput, type: string): object | undefined {
  const found = output.data?.[type];
  return typeof found === "object" && found !== null ? found : undefined;
}

function text(from: object | undefined, name: string): string | undefined {
  const found = from && (from as Record<string, unknown>)[name];
  return typeof found === "string" && found.trim() !== "" ? found : undefined;
}

function texts(from: object | undefined, name: string): string[] {
  const found = from && (from as Record<string, unknown>)[name];
  return Array.isArray(found) ? found.filter((each) => typeof each === "string") : [];
}

function firstHeading(notebook: ShownNotebook): string | undefined {
  for (const cell of notebook.cells) {
    const heading = cell.cell_type === "markdown" ? /^#\s+(.+)$/m.exec(joined(cell.source)) : null;
    if (heading) return heading[1]?.replace(/[*_`]/g, "");
  }
  return undefined;
}
