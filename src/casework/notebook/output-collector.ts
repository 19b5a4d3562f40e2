import type { Message } from "../../kernel/index.js";
import type { Output } from "./notebook.js";

/** Collects the outputs of cells as a front end would store them. */
export interface OutputCollector {
  /** Adds an iopub message of any cell. */
  readonly add: (message: Message) => void;
  /** Assigns the messages of a request to a cell. */
  readonly assign: (requestId: string, cell: string) => void;
  readonly outputsOf: (cell: string) => readonly Output[];
}

interface StoredOutput {
  output: Output;
  readonly displayId: string | undefined;
}

type Content = Readonly<Record<string, unknown>>;

/**
 * Consecutive chunks of one stream become one output, an updated display replaces every earlier one with its id, and a
 * deferred clear happens with the next output.
 */
export function outputCollector(): OutputCollector {
  const cells = new Map<string, StoredOutput[]>();
  const owners = new Map<string, string>();
  const clearing = new Set<string>();

  const add = (cell: string, output: Output, displayId?: string): void => {
    if (clearing.delete(cell)) cells.set(cell, []);
    const kept = cells.get(cell) ?? [];
    const last = kept.at(-1);
    if (last !== undefined && isSameStream(last.output, output)) {
      last.output = { ...output, text: `${last.output["text"]}${output["text"]}` };
    } else kept.push({ output, displayId });
    cells.set(cell, kept);
  };
  const replace = (content: Content): void => {
    const id = displayIdOf(content);
    for (const kept of [...cells.values()].flat()) {
      if (id === undefined || kept.displayId !== id) continue;
      kept.output = { ...kept.output, data: content["data"], metadata: content["metadata"] ?? {} };
    }
  };

  return {
    assign: (requestId, cell) => void owners.set(requestId, cell),
    outputsOf: (cell) => (cells.get(cell) ?? []).map(({ output }) => output),
    add: ({ header, parent, content }) => {
      const cell = owners.get(parent.msg_id ?? "");
      if (header.msg_type === "update_display_data") replace(content);
      if (cell === undefined) return;
      if (header.msg_type === "clear_output" && content["wait"] === true) clearing.add(cell);
      else if (header.msg_type === "clear_output") cells.set(cell, []);
      const output = storedOutput(header.msg_type, content);
      if (output !== undefined) add(cell, output, displayIdOf(content));
    },
  };
}

/** The stored form of a message, without its transient data. */
function storedOutput(type: string, content: Content): Output | undefined {
  const { data, metadata = {}, name, text, execution_count, ename, evalue, traceback } = content;
  if (type === "stream") return { output_type: type, name, text };
  if (type === "display_data") return { output_type: type, data, metadata };
  if (type === "execute_result") return { output_type: type, data, metadata, execution_count };
  if (type === "error") return { output_type: type, ename, evalue, traceback };
  return undefined;
}

function displayIdOf(content: Content): string | undefined {
  const transient = content["transient"];
  const id =
    typeof transient === "object" && transient !== null ? Reflect.get(transient, "display_id") : undefined;
  return typeof id === "string" ? id : undefined;
}

function isSameStream(one: Output, other: Output): boolean {
  return one.output_type === "stream" && other.output_type === "stream" && one["name"] === other["name"];
}
