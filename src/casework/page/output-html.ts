import { escapeHtml } from "../../../kernel-helpers/wording/index.js";
import { escapeTerminal } from "./escape-terminal.js";
import { markdownHtml } from "./markdown-html.js";
import { joined, type ShownOutput } from "./shown-notebook.js";

type Render = (data: string) => string;

const image = (type: string): Render => {
  return (data) =>
    `<img src="data:${type};base64,${escapeHtml(data.replace(/\s/g, ""))}" alt="picture from the code above">`;
};

// Richest first: the page shows the first one that an output has.
const renderers: Readonly<Record<string, Render>> = {
  "text/html": (data) => withoutLibrary(data),
  "image/svg+xml": (data) => image("image/svg+xml")(Buffer.from(data).toString("base64")),
  "image/png": image("image/png"),
  "image/jpeg": image("image/jpeg"),
  "text/markdown": (data) => markdownHtml(data),
  "text/plain": (data) => `<pre>${escapeTerminal(data)}</pre>`,
};

/** The outputs of a cell as HTML; consecutive chunks of one stream become one block. */
export function outputsHtml(outputs: readonly ShownOutput[]): string {
  return mergedStreams(outputs)
    .map(
      (output) =>
        `<div class="output${output.output_type === "error" ? " failed" : ""}">${outputHtml(output)}</div>`,
    )
    .join("\n");
}

function outputHtml(output: ShownOutput): string {
  if (output.output_type === "stream") {
    return `<pre class="${output.name === "stderr" ? "aside" : "said"}">${escapeTerminal(joined(output.text))}</pre>`;
  }
  if (output.output_type === "error") {
    const trace = output.traceback?.join("\n") || `${output.ename}: ${output.evalue}`;
    return `<pre>${escapeTerminal(trace)}</pre>`;
  }
  const data = output.data ?? {};
  const type = Object.keys(renderers).find((kind) => Object.hasOwn(data, kind));
  if (type !== undefined) return (renderers[type] as Render)(joined(data[type]));
  return `<pre>${escapeHtml(JSON.stringify(data, null, 1))}</pre>`;
}

function mergedStreams(outputs: readonly ShownOutput[]): ShownOutput[] {
  const merged: ShownOutput[] = [];
  for (const output of outputs) {
    const last = merged.at(-1);
    if (output.output_type === "stream" && last?.output_type === "stream" && last.name === output.name) {
      merged[merged.length - 1] = { ...last, text: joined(last.text) + joined(output.text) };
    } else {
      merged.push(output);
    }
  }
  return merged;
}

/** Removes the plotting library that comes with the first figure of a notebook; a page has its own copy at its end. */
function withoutLibrary(html: string): string {
  return html.replace(/<script data-periodwise="library">[\s\S]*?<\/script>/g, "");
}
