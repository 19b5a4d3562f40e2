import type { CellSession } from "../cells/cell-session.js";
import type { Interrupts } from "../cells/interrupts.js";
import type { SourceRegister } from "../cells/source-register.js";
import type { StringLanguage } from "../language/string-language.js";
import type { Message } from "../protocol/message.js";
import type { InputQuestions } from "./input-questions.js";

/** What the handlers of requests work with. */
export interface KernelState {
  /** Built on first use, which is usually the idle time after the start. */
  readonly session: () => CellSession;
  readonly sources: SourceRegister;
  readonly interrupts: Interrupts;
  /** The services for languages inside strings, loaded once, when first asked for. */
  readonly languages: () => Promise<readonly StringLanguage[]>;
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
