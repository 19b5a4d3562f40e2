import type { CellSession } from "../cells/cell-session.js";
import type { Interrupts } from "../cells/interrupts.js";
import type { SourceRegistry } from "../cells/source-registry.js";
import type { StringLanguage } from "../language/string-language.js";
import type { Message } from "../protocol/message.js";
import type { InputQuestions } from "./input-questions.js";

/** State shared by the request handlers. */
export interface KernelState {
  /** Built on first use, usually in the idle time after the start. */
  readonly session: () => CellSession;
  readonly sources: SourceRegistry;
  readonly interrupts: Interrupts;
  /** The services for languages inside strings, loaded on first use. */
  readonly languages: () => Promise<readonly StringLanguage[]>;
  /** Markdown about an imported function, put behind its docstring; undefined for a name that it does not know. */
  readonly functionHelp: (name: string) => Promise<string | undefined>;
  readonly questions: InputQuestions;
  readonly history: HistoryEntry[];
  readonly publish: (parent: Message["parent"], type: string, content: object) => void;
  /** Cells stored in history so far. */
  count: number;
  /** Cells run so far, stored or not. */
  serial: number;
}

export interface HistoryEntry {
  readonly count: number;
  readonly text: string;
  /** The text form of its value, once it has one. */
  result?: string;
}
