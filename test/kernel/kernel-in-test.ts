import { mkdirSync, mkdtempSync, realpathSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { afterAll } from "vitest";
import { type KernelSession, startKernelSession } from "../../src/casework/client/kernel-session.js";
import type { Message } from "../../src/kernel/index.js";

export const root: string = join(import.meta.dirname, "..", "..");
/** The built program: tests drive the kernel as a front end does, as a process of its own. */
export const kernelCommand: readonly string[] = [
  process.execPath,
  join(root, "dist/src/cli/main.js"),
  "kernel",
];

/** What came of a cell: the reply's content, and what was shown. */
export interface Ran {
  readonly reply: Readonly<Record<string, unknown>>;
  readonly messages: readonly Message[];
  /** Text form of the value, if it has one. */
  readonly value: unknown;
  readonly stdout: string;
  readonly stderr: string;
}

export interface TestKernel {
  readonly folder: string;
  readonly run: (code: string, options?: object) => Promise<Ran>;
  readonly ask: (type: string, content: object) => Promise<Readonly<Record<string, unknown>>>;
  readonly conversation: KernelSession;
}

/** An empty folder for a test file, removed after it; files are given as text by path. */
export function testFolder(files: Readonly<Record<string, string>> = {}): string {
  const folder = realpathSync(mkdtempSync(join(tmpdir(), "periodwise-test-")));
  for (const [path, text] of Object.entries(files)) writeInto(folder, path, text);
  afterAll(() => rmSync(folder, { recursive: true, force: true }));
  return folder;
}

export function writeInto(folder: string, path: string, text: string): void {
  mkdirSync(dirname(join(folder, path)), { recursive: true });
  writeFileSync(join(folder, path), text);
}

/** A kernel for a test file, shut down after it. */
export async function testKernel(folder: string = testFolder()): Promise<TestKernel> {
  const conversation = await startKernelSession(kernelCommand, folder);
  afterAll(() => conversation.end());
  return {
    folder,
    conversation,
    ask: async (type, content) => (await conversation.request(type, content)).content,
    run: (code, options = {}) => runCell(conversation, code, options),
  };
}

async function runCell(conversation: KernelSession, code: string, options: object): Promise<Ran> {
  const messages: Message[] = [];
  const content = { code, silent: false, store_history: true, allow_stdin: false, ...options };
  const { content: reply } = await conversation.request("execute_request", content, (one) =>
    messages.push(one),
  );
  const result = messages.find(({ header }) => header.msg_type === "execute_result");
  const printed = (name: string): string =>
    messages
      .filter(({ header, content: one }) => header.msg_type === "stream" && one["name"] === name)
      .map((one) => one.content["text"])
      .join("");
  const data = result?.content["data"] as Readonly<Record<string, unknown>> | undefined;
  return {
    reply,
    messages,
    value: data?.["text/plain"],
    stdout: printed("stdout"),
    stderr: printed("stderr"),
  };
}

/** Text without the escape sequences that colour it. */
export function plain(text: string): string {
  return text.split("\u001b").reduce((done, part) => done + part.replace(/^\[[0-9;]*m/, ""));
}
