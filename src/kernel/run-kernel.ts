import { randomUUID } from "node:crypto";
import { type CellSession, cellSession, followName, stretchesName } from "./cells/cell-session.js";
import { interrupts } from "./cells/interrupts.js";
import { runInStretches } from "./cells/run-in-stretches.js";
import { sourceRegister } from "./cells/source-register.js";
import type { StringLanguage } from "./language/string-language.js";
import { captureStreams } from "./output/capture-streams.js";
import { clearOutput, display } from "./output/display.js";
import { readConnection } from "./protocol/connection.js";
import { headersOf, type Message } from "./protocol/message.js";
import { envelope } from "./protocol/wire.js";
import { requestLoop } from "./request-loop.js";
import { inputQuestions } from "./requests/input-questions.js";
import { kernelInfo } from "./requests/kernel-info.js";
import type { KernelState } from "./requests/kernel-state.js";
import { surviveStrayErrors } from "./stray-errors.js";
import { newPause } from "./transport/pause.js";
import type { Outlet } from "./transport/port-messages.js";
import { startTransport } from "./transport/start-transport.js";

/** When the first cells have run, what was compiled for them is worth keeping for the next start. */
const keepAfterMs = 6_000;
/** Loaded sooner by the first cell that has a string. */
const languagesAfterMs = 1_000;

/** By this name a package used in cells finds `display`. */
const displayName: unique symbol = Symbol.for("periodwise.display") as never;

/**
 * Runs a kernel in this process until a front end shuts it down. Cells run in the present folder.
 *
 * @param languages - gives the services for languages inside strings of a cell, once the kernel has time.
 * @throws {KernelError} `unreadable-connection-file` | `incomplete-connection-file`.
 */
export function runKernel(
  connectionFile: string,
  languages: () => Promise<readonly StringLanguage[]> = async () => [],
): void {
  const connection = readConnection(connectionFile);
  const session = randomUUID();
  const pause = newPause();
  const transport = startTransport({ connection, session, kernelInfo: kernelInfo(), pause });
  const newHeader = headersOf("kernel", session);

  const send = (
    outlet: Outlet,
    message: Omit<Message, "header" | "metadata" | "buffers">,
    type: string,
  ): void => {
    const sealed = envelope({ header: newHeader(type), metadata: {}, buffers: [], ...message });
    transport.post({ kind: "send", outlet, sealed });
  };
  const publish: KernelState["publish"] = (parent, type, content) =>
    send("iopub", { identities: [Buffer.from(type)], parent, content: { ...content } }, type);
  const reply = (outlet: Outlet, request: Message, type: string, content: object): void =>
    send(outlet, { identities: request.identities, parent: request.header, content: { ...content } }, type);

  const sources = sourceRegister();
  let cells: CellSession | undefined;
  let services: Promise<readonly StringLanguage[]> | undefined;
  const kernel: KernelState = {
    session: () => {
      cells ??= cellSession(process.cwd(), sources);
      return cells;
    },
    sources,
    interrupts: interrupts(pause),
    languages: () => {
      services ??= languages();
      return services;
    },
    questions: inputQuestions((request, content) => reply("stdin", request, "input_request", content)),
    history: [],
    publish,
    count: 0,
    serial: 0,
  };
  offerGlobals(kernel);
  captureStreams();
  surviveStrayErrors(kernel);
  transport.receive(requestLoop(kernel, reply));
  // The transport thread answers the first requests meanwhile.
  setImmediate(() => kernel.session());
  setTimeout(() => void kernel.languages(), languagesAfterMs);
  setTimeout(() => kernel.session().compiler.keep(), keepAfterMs);
}

/** Puts what cells may name without an import on the global object, out of sight of enumeration. */
function offerGlobals(kernel: KernelState): void {
  const offered: Record<string | symbol, unknown> = {
    display,
    clearOutput,
    input: kernel.questions.ask,
    [displayName]: display,
    [followName]: kernel.interrupts.follow,
    [stretchesName]: runInStretches,
  };
  for (const name of Reflect.ownKeys(offered)) {
    Object.defineProperty(globalThis, name, {
      value: offered[name as string],
      configurable: true,
      writable: true,
    });
  }
}
