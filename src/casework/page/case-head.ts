import { joined, type ShownNotebook, type ShownOutput } from "./shown-notebook.js";

/** MIME types by which outputs say what they are to a page; all hold JSON. */
const caseType = "application/vnd.periodwise.case+json";
const progressType = "application/vnd.periodwise.progress+json";
const answerType = "application/vnd.periodwise.answer+json";

/** What stands at the top of a page. */
export interface CaseHead {
  readonly title: string | undefined;
  readonly question: string | undefined;
  readonly about: string | undefined;
  readonly answers: readonly { readonly sentence: string; readonly cautions: readonly string[] }[];
}

/** Reads a notebook's title, question and answers from what its cells put out. */
export function caseHead(notebook: ShownNotebook): CaseHead {
  const outputs = notebook.cells.flatMap((cell) => cell.outputs ?? []);
  const opened = outputs.map((output) => jsonOf(output, caseType)).find((found) => found !== undefined);
  return {
    title: text(opened, "title") ?? firstHeading(notebook),
    question: text(opened, "question"),
    about: text(opened, "about"),
    answers: outputs.flatMap((output) => {
      const said = jsonOf(output, answerType);
      const sentence = text(said, "sentence");
      return sentence === undefined ? [] : [{ sentence, cautions: texts(said, "cautions") }];
    }),
  };
}

/** Whether an output is left out of a page: the head says it already, or it tells how long some work took. */
export function leftOut(output: ShownOutput): boolean {
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
