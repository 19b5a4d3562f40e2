import type { Message } from "../protocol/message.js";
import type { HistoryEntry, KernelState } from "./kernel-state.js";

/** Rows carry a session number; the kernel stores only its own session. */
const session = 1;
const presentSessions: readonly unknown[] = [undefined, null, 0, session];

type Content = Message["content"];
type Choice = (entries: readonly HistoryEntry[], content: Content) => readonly HistoryEntry[];

/** @see Jupyter messaging, "History". */
export function history(kernel: KernelState, { content }: Message): object {
  const kind = String(content["hist_access_type"]);
  const chosen = (Object.hasOwn(choices, kind) ? choices[kind] : undefined)?.(kernel.history, content) ?? [];
  const rows = chosen.map(({ count, text, result }) => [
    session,
    count,
    content["output"] === true ? [text, result ?? null] : text,
  ]);
  return { status: "ok", history: rows };
}

const choices: Readonly<Record<string, Choice>> = {
  tail: (entries, content) => lastOf(entries, content["n"]),
  range: (entries, content) => {
    if (!presentSessions.includes(content["session"])) return [];
    const start = typeof content["start"] === "number" ? content["start"] : 0;
    const stop = typeof content["stop"] === "number" ? content["stop"] : Number.POSITIVE_INFINITY;
    return entries.filter(({ count }) => start <= count && count < stop);
  },
  search: (entries, content) => {
    const pattern = globPattern(String(content["pattern"] ?? "*"));
    const found = entries.filter(({ text }) => pattern.test(text));
    return lastOf(content["unique"] === true ? lastOfEachText(found) : found, content["n"]);
  },
};

function lastOf(entries: readonly HistoryEntry[], n: unknown): readonly HistoryEntry[] {
  return typeof n === "number" ? entries.slice(Math.max(0, entries.length - n)) : entries;
}

function lastOfEachText(entries: readonly HistoryEntry[]): readonly HistoryEntry[] {
  return entries.filter(({ text }, index) => !entries.slice(index + 1).some((later) => later.text === text));
}

/** A glob pattern: `*` for any text, `?` for one character. */
function globPattern(glob: string): RegExp {
  const source = glob
    .replace(/[.+^${}()|[\]\\]/g, "\\$&")
    .replaceAll("*", "[^]*")
    .replaceAll("?", "[^]");
  return new RegExp(`^${source}$`);
}
