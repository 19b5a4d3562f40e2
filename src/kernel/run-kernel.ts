import { randomUUID } from "node:crypto";
import { type CellSession, cellSession, runBetweenAwaitsName, trackName } from "./cells/cell-session.js";
import { interrupts } from "./cells/interrupts.js";
import { runBetweenAwaits } from "./cells/run-between-awaits.js";
import { sourceRegistry } from "./cells/source-registry.js";
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
import { newInterruptFlag } from "./transport/interrupt-flag.js";
import type { OutgoingChannel } from "./transport/port-messages.js";
import { startTransport } from "./transport/start-transport.js";
import { reportUncaughtErrors } from "./uncaught-errors.js";

/** By then the first cells have run, and the compiler cache is worth saving for the next start. */
const keepAfterMs = 6_000;
/** Loaded earlier by the first cell that has a string. */
const languagesAfterMs = 1_000;

/** Symbol under which packages used in cells find `display`. */
const displayName: unique symbol = Symbol.for("periodwise.display") as never;

/**
 * Runs a kernel in this process until a front end shuts it down. Cells run in the current folder.
 *
 * @param languages - loads the services for languages inside strings of a cell; called when the kernel is idle.
 * @param functionHelp - tells more about a function that a cell imports than its docstring does.
 * @throws {KernelError} `unreadable-connection-file` | `incomplete-connection-file`.
 */
export function runKernel(
  connectionFile: string,
  languages: () => Promise<readonly StringLanguage[]> = async () => [],
  functionHelp: KernelState["functionHelp"] = async () => undefined,
): void {
  const connection = readConnection(connectionFile);
  const session = randomUUID();
  const pause = newInterruptFlag();
  const transport = startTransport({ connection, session, kernelInfo: kernelInfo(), interruptFlag: pause });
  const newHeader = headersOf("kernel", session);

  const send = (
    outlet: OutgoingChannel,
    message: Omit<Message, "header" | "metadata" | "buffers">,
    type: string,
  ): void => {
    const sealed = envelope({ header: newHeader(type), metadata: {}, buffers: [], ...message });
    transport.post({ kind: "send", outlet, sealed });
  };
  const publish: KernelState["publish"] = (parent, type, content) =>
    send("iopub", { identities: [Buffer.from(type)], parent, content: { ...content } }, type);
  const reply = (outlet: OutgoingChannel, request: Message, type: string, content: object): void =>
    send(outlet, { identities: request.identities, parent: request.header, content: { ...content } }, type);

  const sources = sourceRegistry();
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
    functionHelp,
    questions: inputQuestions((request, content) => reply("stdin", request, "input_request", content)),
    history: [],
    publish,
    count: 0,
    serial: 0,
  };
  defineGlobals(kernel);
  captureStreams();
  reportUncaughtErrors(kernel);
  transport.receive(requestLoop(kernel, reply));
  // Meanwhile the transport thread answers the first requests.
  setImmediate(() => kernel.session());
  setTimeout(() => void kernel.languages(), languagesAfterMs);
  setTimeout(() => kernel.session().compiler.saveCache(), keepAfterMs);
}

/** Defines what cells can use without an import as non-enumerable globals. */
function defineGlobals(kernel: KernelState): void {
  const globals: Record<string | symbol, unknown> = {
    display,
    clearOutput,
    input: kernel.questions.ask,
    [displayName]: display,
    [trackName]: kernel.interrupts.track,
    [runBetweenAwaitsName]: runBetweenAwaits,
  };
  for (const name of Reflect.ownKeys(globals)) {
    Object.defineProperty(globalThis, name, {
      value: globals[name as string],
      configurable: true,
      writable: true,
    });
  }
}
