import type { Message } from "../protocol/message.js";
import { toUnits } from "./code-points.js";

/** A text with a position in it. */
export interface Cursor {
  readonly text: string;
  /** In UTF-16 units. */
  readonly position: number;
}

/** Reads the text and the cursor of a request; without a cursor, the end of the text. */
export function cursorOf({ content }: Message): Cursor {
  const text = String(content["code"] ?? "");
  const given = content["cursor_pos"];
  return { text, position: typeof given === "number" ? toUnits(text, given) : text.length };
}
