import type { Notebook } from "./notebook.js";

const answerType = "application/vnd.periodwise.answer+json";

/** The answer of a notebook: its last answer sentence, if any. */
export function answerOf(notebook: Notebook): string | undefined {
  const sentences = notebook.cells
    .flatMap((cell) => cell.outputs ?? [])
    .map((output) => output["data"])
    .flatMap((data) =>
      typeof data === "object" && data !== null ? [Reflect.get(data, answerType) as unknown] : [],
    )
    .map((answer) =>
      typeof answer === "object" && answer !== null ? Reflect.get(answer, "sentence") : undefined,
    );
  return sentences.filter((sentence) => typeof sentence === "string").at(-1);
}
