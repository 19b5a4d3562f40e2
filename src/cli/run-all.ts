import { basename } from "node:path";
import { type NotebookRun, type RunOptions, runNotebook } from "../casework/index.js";

/** Runs notebooks one after the other and prints one line for each. @returns the exit status: 1 when one failed. */
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
  return `${basename(path)}: ${answer ?? "completed, without an answer"} [${page}]`;
}

function failureText({ path, failure }: Extract<NotebookRun, { kind: "failed" }>): string {
  const { cell, traceback, ename, evalue } = failure;
  const shown = process.stderr.isTTY ? traceback : traceback.map(plain);
  return [
    `${basename(path)}: code cell ${cell} failed with ${ename}: ${evalue}`,
    ...shown.slice(1),
    "Nothing was written. Correct the cell and run the notebook again; to inspect its values, run it up to that cell in a front end.",
  ].join("\n");
}

/** Text without terminal colours. */
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
