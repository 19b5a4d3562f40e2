import type { Message } from "../../kernel/index.js";
import { kernelSilent } from "../refusals.js";
import { type KernelClient, kernelClient } from "./kernel-client.js";
import { type KernelCommand, startKernelProcess } from "./kernel-process.js";

/** A kernel of our own, ready to be asked. */
export interface Conversation {
  readonly request: (
    type: string,
    content: object,
    onOutput?: (message: Message) => void,
  ) => Promise<Message>;
  readonly interrupt: () => void;
  readonly end: () => Promise<void>;
}

const askAgainMs = 50;
const patienceMs = 60_000;

/** Starts a kernel and waits until both its replies and its outputs arrive here. */
export async function converse(command: KernelCommand, folder: string): Promise<Conversation> {
  const process = await startKernelProcess(command, folder);
  const client = kernelClient(process.connection);
  const end = async (): Promise<void> => {
    client.send("control", "shutdown_request", { restart: false });
    await process.dispose();
    await client.close();
  };
  try {
    await Promise.race([ready(client), process.ended]);
  } catch (cause) {
    process.child.kill("SIGKILL");
    await end();
    throw cause;
  }
  return {
    request: (type, content, onOutput) => Promise.race([ask(client, type, content, onOutput), process.ended]),
    interrupt: () => void client.send("control", "interrupt_request", {}),
    end,
  };
}

/** Asks for kernel info until both the reply and an iopub message came: a subscription takes a moment. */
function ready(client: KernelClient): Promise<void> {
  return new Promise((resolve, reject) => {
    const heard = new Set<string>();
    const ask = (): string => client.send("shell", "kernel_info_request", {});
    const timer = setInterval(ask, askAgainMs);
    const deadline = setTimeout(() => finish(kernelSilent(patienceMs / 1_000)), patienceMs);
    const finish = (cause?: Error): void => {
      clearInterval(timer);
      clearTimeout(deadline);
      stop();
      if (cause) reject(cause);
      else resolve();
    };
    const stop = client.hear((channel) => {
      heard.add(channel);
      if (heard.has("shell") && heard.has("iopub")) finish();
    });
    ask();
  });
}

function ask(
  client: KernelClient,
  type: string,
  content: object,
  onOutput: (message: Message) => void = () => undefined,
): Promise<Message> {
  return new Promise((resolve) => {
    const replyTo = finishedReply(client.send("shell", type, content));
    const stop = client.hear((channel, message) => {
      // Outputs are passed on whoever they belong to: a display of an earlier cell may be replaced now.
      if (channel === "iopub") onOutput(message);
      const reply = replyTo(message);
      if (reply === undefined) return;
      stop();
      resolve(reply);
    });
  });
}

/** Takes messages and gives the reply to a request once the kernel has also said that it is idle. */
function finishedReply(id: string): (message: Message) => Message | undefined {
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
