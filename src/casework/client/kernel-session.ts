import type { Message } from "../../kernel/index.js";
import { kernelSilentError } from "../errors.js";
import { type KernelClient, kernelClient } from "./kernel-client.js";
import { type KernelCommand, startKernelProcess } from "./kernel-process.js";

/** A running kernel that accepts requests. */
export interface KernelSession {
  readonly request: (
    type: string,
    content: object,
    onOutput?: (message: Message) => void,
  ) => Promise<Message>;
  readonly interrupt: () => void;
  readonly end: () => Promise<void>;
}

const retryMs = 50;
const startTimeoutMs = 60_000;

/** Starts a kernel and waits until both its replies and its outputs arrive. */
export async function startKernelSession(command: KernelCommand, folder: string): Promise<KernelSession> {
  const process = await startKernelProcess(command, folder);
  const client = kernelClient(process.connection);
  const end = async (): Promise<void> => {
    client.send("control", "shutdown_request", { restart: false });
    await process.dispose();
    await client.close();
  };
  try {
    await Promise.race([untilReady(client), process.ended]);
  } catch (cause) {
    process.child.kill("SIGKILL");
    await end();
    throw cause;
  }
  return {
    request: (type, content, onOutput) =>
      Promise.race([sendRequest(client, type, content, onOutput), process.ended]),
    interrupt: () => void client.send("control", "interrupt_request", {}),
    end,
  };
}

/** Requests kernel info until both a reply and an iopub message have arrived: a subscription takes a moment. */
function untilReady(client: KernelClient): Promise<void> {
  return new Promise((resolve, reject) => {
    const channels = new Set<string>();
    const sendRequest = (): string => client.send("shell", "kernel_info_request", {});
    const timer = setInterval(sendRequest, retryMs);
    const deadline = setTimeout(() => finish(kernelSilentError(startTimeoutMs / 1_000)), startTimeoutMs);
    const finish = (cause?: Error): void => {
      clearInterval(timer);
      clearTimeout(deadline);
      stop();
      if (cause) reject(cause);
      else resolve();
    };
    const stop = client.listen((channel) => {
      channels.add(channel);
      if (channels.has("shell") && channels.has("iopub")) finish();
    });
    sendRequest();
  });
}

function sendRequest(
  client: KernelClient,
  type: string,
  content: object,
  onOutput: (message: Message) => void = () => undefined,
): Promise<Message> {
  return new Promise((resolve) => {
    const replyTo = replyWhenIdle(client.send("shell", type, content));
    const stop = client.listen((channel, message) => {
      // Outputs of every cell are passed on: a display of an earlier cell may be replaced now.
      if (channel === "iopub") onOutput(message);
      const reply = replyTo(message);
      if (reply === undefined) return;
      stop();
      resolve(reply);
    });
  });
}

/** Returns the reply to a request once the kernel is also idle again. */
function replyWhenIdle(id: string): (message: Message) => Message | undefined {
  let reply: Message | undefined;
  let idle = false;
  return (message) => {
    const { header, parent, content } = message;
    if (parent.msg_id !== id) return undefined;
    if (header.msg_type.endsWith("_reply")) reply = message;
    if (header.msg_type === "status" && content["execution_state"] === "idle") idle = true;
    return idle ? reply : undefined;
  };
}
