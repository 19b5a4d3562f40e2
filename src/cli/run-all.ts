import { basename } from "node:path";
import { type NotebookRun, type RunOptions, runNotebook } from "../casework/index.js";

/** Runs notebooks one after the other, a line of outcome each. @returns the exit status: 1 when one failed. */
export async function runAll(paths: readonly string[], options: RunOptions): Promise<number> {
  let status = 0;
  for (const [index, path] of paths.entries()) {
    const place = paths.length > 1 ? `${index + 1} of ${paths.length}, ` : "";
    const run = await attempt(path, { ...options, onCell: progress(`${place}${basename(path)}`) });
    if (run.kind === "completed") console.log(completedLine(run));
    else {
      console.error(run.text);
      status = 1;
    }
  }
  return status;
}

type Attempt =
  | Extract<NotebookRun, { kind: "completed" }>
  | { readonly kind: "failed"; readonly text: string };

async function attempt(path: string, options: RunOptions): Promise<Attempt> {
  try {
    const run = await runNotebook(path, options);
    clearProgress();
    return run.kind === "completed" ? run : { kind: "failed", text: failureText(run) };
  } catch (cause) {
    clearProgress();
    return {
      kind: "failed",
      text: `${basename(path)}: ${cause instanceof Error ? cause.message : String(cause)}`,
    };
  }
}

function completedLine({ path, answer, page }: Extract<NotebookRun, { kind: "completed" }>): string {
  return `${basename(path)}: ${answer ?? "ran to its end; it gives no answer"} [${page}]`;
}

function failureText({ path, failure }: Extract<NotebookRun, { kind: "failed" }>): string {
  const { cell, traceback, ename, evalue } = failure;
  const told = process.stderr.isTTY ? traceback : traceback.map(plain);
  return [
    `${basename(path)}: stopped at code cell ${cell} with ${ename}: ${evalue}`,
    ...told.slice(1),
    "Nothing was written. Correct that cell and run it again; in a front end, run the cells up to it to look around.",
  ].join("\n");
}

/** Text without the escape sequences that colour it on a terminal. */
function plain(text: string): string {
  return text.split("\u001b").reduce((done, part) => done + part.replace(/^\[[0-9;]*m/, ""));
}

function progress(label: string): (cell: number, of: number) => void {
  return (cell, of) => {
    if (process.stderr.isTTY) process.stderr.write(`\r\u001b[K${label}: cell ${cell} of ${of}`);
  };
}

function clearProgress(): void {
  if (process.stderr.isTTY) process.stderr.write("\r\u001b[K");
}
