import { type Bundle, escapeHtml, oneLine, theme, typeface } from "../tables/index.js";

/** Where progress is shown, and how it is interrupted. */
export interface ProgressOutput {
  /** Seconds on any clock that only goes forward. */
  readonly now: () => number;
  /** Replaces the last line. `share` is the part done; undefined when unknown or finished. */
  readonly show: (line: string, share: number | undefined, last: boolean) => void;
  /** Whether the work was interrupted. */
  readonly interrupted: () => boolean;
}

type Display = (bundle: Bundle, options: { display_id: string; update?: boolean }) => void;

/** Marks outputs that a page omits. */
const mark = "application/vnd.periodwise.progress+json";

let displays = 0;

/** The notebook if there is a kernel, otherwise the terminal. */
export function currentOutput(): ProgressOutput {
  const offered = globalThis as { [name: symbol]: unknown };
  const display = offered[Symbol.for("periodwise.display")];
  const question = offered[Symbol.for("periodwise.interrupt")];
  return {
    now: () => performance.now() / 1000,
    show: typeof display === "function" ? inNotebook(display as Display) : inTerminal(process.stderr),
    interrupted: () => typeof question === "function" && question() === true,
  };
}

/** One display that is updated in place. */
function inNotebook(display: Display): ProgressOutput["show"] {
  const display_id = `periodwise-progress-${process.pid}-${++displays}`;
  let shown = false;
  return (line, share) => {
    const html = line === "" ? "" : lineHtml(line, share);
    display({ [mark]: {}, "text/plain": oneLine(line), "text/html": html }, { display_id, update: shown });
    shown = true;
  };
}

/** One line that is overwritten; only the final line when the output is a file. */
function inTerminal(out: NodeJS.WriteStream): ProgressOutput["show"] {
  return (line, _share, last) => {
    if (out.isTTY)
      out.write(`\r\u001b[2K${oneLine(line).slice(0, out.columns - 1)}${last && line !== "" ? "\n" : ""}`);
    else if (last && line !== "") out.write(`${oneLine(line)}\n`);
  };
}

function lineHtml(line: string, share: number | undefined): string {
  const text = `font-family:${typeface};font-size:13px;color:${theme.mutedText};margin:.3em 0`;
  const percent = share === undefined ? 0 : Math.round(100 * share);
  const bar =
    share === undefined
      ? ""
      : `;padding:.25em .6em;max-width:40em;border:1px solid ${theme.border};background:linear-gradient(90deg,#d3e4e2 ${percent}%,${theme.background} ${percent}%)`;
  return `<div class="pw-progress" role="status" dir="auto" style="${text}${bar}">${escapeHtml(line)}</div>`;
}
