import { parentPort, workerData } from "node:worker_threads";
import { headersOf, type Message } from "../protocol/message.js";
import { envelope } from "../protocol/wire.js";
import { bindChannels, type Channels } from "./channels.js";
import { exitWithParent } from "./exit-with-parent.js";
import { interruptFlag } from "./interrupt-flag.js";
import type { FromTransport, OutgoingChannel, ToTransport, TransportData } from "./port-messages.js";

/**
 * The transport thread. It owns every socket, so that control, heartbeat and kernel info are answered, and
 * outputs leave, while a cell keeps the kernel's own thread busy.
 */
const { connection, session, kernelInfo, interruptFlag: shared } = workerData as TransportData;
// This file only ever runs as a worker, which has a port to its parent.
const port = parentPort!;
const newHeader = headersOf("kernel", session);
const breakDelayMs = 150;
const exitDelayMs = 400;

const postToKernel = (message: FromTransport): void => port.postMessage(message);

function reply(
  channels: Channels,
  outlet: OutgoingChannel,
  request: Message,
  type: string,
  content: object,
): void {
  const { identities, header } = request;
  const message = { identities, header: newHeader(type), parent: header, metadata: {}, content, buffers: [] };
  channels.send(outlet, envelope(message as Message));
}

function publish(channels: Channels, parent: Message["parent"], type: string, content: object): void {
  const header = newHeader(type);
  const message = { identities: [Buffer.from(type)], header, parent, metadata: {}, content, buffers: [] };
  channels.send("iopub", envelope(message as Message));
}

/** @see Jupyter messaging, "Kernel interrupt". */
function interrupt(): void {
  const count = Atomics.add(shared, interruptFlag.countAt, 1) + 1;
  Atomics.store(shared, interruptFlag.stateAt, interruptFlag.fresh);
  postToKernel({ kind: "interrupt", count });
  // Library code has no checks in its loops; a signal ends the synchronous part of a cell anywhere.
  // Windows has no such signal: there it would end the process.
  setTimeout(() => {
    const ignored =
      Atomics.load(shared, interruptFlag.stateAt) === interruptFlag.fresh &&
      shared[interruptFlag.countAt] === count;
    if (ignored && process.platform !== "win32") process.kill(process.pid, "SIGINT");
  }, breakDelayMs);
}

async function shutDown(channels: Channels): Promise<void> {
  await channels.close();
  postToKernel({ kind: "shutdown" });
  // A cell that never yields must not keep the process alive: the sockets are closed, and nothing else is due.
  setTimeout(() => process.kill(process.pid, "SIGKILL"), exitDelayMs);
}

type Handler = (channels: Channels, outlet: "shell" | "control", request: Message) => void;

/** Requests that must not wait for a cell. */
const immediate: Readonly<Record<string, Handler>> = {
  kernel_info_request: (channels, outlet, request) =>
    reply(channels, outlet, request, "kernel_info_reply", kernelInfo),
  interrupt_request: (channels, outlet, request) => {
    interrupt();
    reply(channels, outlet, request, "interrupt_reply", { status: "ok" });
  },
  shutdown_request: (channels, outlet, request) => {
    const content = { status: "ok", restart: request.content["restart"] === true };
    reply(channels, outlet, request, "shutdown_reply", content);
    publish(channels, request.header, "shutdown_reply", content);
  },
};

function receive(channels: Channels, outlet: "shell" | "control", message: Message): void {
  const type = message.header.msg_type;
  const handler = Object.hasOwn(immediate, type) ? immediate[type] : undefined;
  if (handler === undefined) {
    postToKernel({ kind: "request", outlet, message });
    return;
  }
  publish(channels, message.header, "status", { execution_state: "busy" });
  try {
    handler(channels, outlet, message);
  } finally {
    publish(channels, message.header, "status", { execution_state: "idle" });
  }
  if (type === "shutdown_request") void shutDown(channels);
}

async function serve(): Promise<void> {
  const channels = await bindChannels(connection);
  port.on("message", ({ outlet, sealed }: ToTransport) => channels.send(outlet, sealed));
  exitWithParent(() => void shutDown(channels));
  publish(channels, {}, "status", { execution_state: "starting" });
  await Promise.all([
    channels.listen("shell", (message) => receive(channels, "shell", message)),
    channels.listen("control", (message) => receive(channels, "control", message)),
    channels.listen("stdin", (message) => postToKernel({ kind: "input", message })),
    channels.echoHeartbeat(),
  ]);
}

void serve();
