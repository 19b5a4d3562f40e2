import { errorReport } from "./cells/traceback.js";
import type { Message } from "./protocol/message.js";
import { execute } from "./requests/execute.js";
import { type Handler, handlers } from "./requests/handlers.js";
import type { KernelState } from "./requests/kernel-state.js";
import type { FromTransport, OutgoingChannel } from "./transport/port-messages.js";

export type ReplyTo = (outlet: OutgoingChannel, request: Message, type: string, content: object) => void;

interface Queued {
  readonly outlet: OutgoingChannel;
  readonly request: Message;
}

/** Handles the messages of the transport thread. Cells run one after the other; other requests do not wait. */
export function requestLoop(kernel: KernelState, reply: ReplyTo): (message: FromTransport) => void {
  const queue: Queued[] = [];
  let busy = false;

  const work = async (): Promise<void> => {
    if (busy) return;
    busy = true;
    for (let next = queue.shift(); next !== undefined; next = queue.shift()) {
      const { outlet, request } = next;
      const given = await withBusyStatus(kernel, request, async () => {
        const content = await execute(kernel, request);
        const stops =
          Reflect.get(content, "status") === "error" && request.content["stop_on_error"] !== false;
        // Requests that have arrived by now were queued behind the failed cell; later ones were not.
        if (stops) await new Promise(setImmediate);
        const aborted = stops ? queue.splice(0) : [];
        reply(outlet, request, "execute_reply", content);
        return aborted;
      });
      await abort(given);
    }
    busy = false;
  };

  const abort = async (given: readonly Queued[]): Promise<void> => {
    for (const { outlet, request } of given) {
      await withBusyStatus(kernel, request, async () => {
        reply(outlet, request, "execute_reply", { status: "aborted", execution_count: kernel.count });
      });
    }
  };

  return (message) => {
    if (message.kind === "shutdown") process.exit(0);
    if (message.kind === "interrupt") kernel.interrupts.received(message.count);
    if (message.kind === "input") kernel.questions.answer(message.message);
    if (message.kind !== "request") return;
    const { outlet, message: request } = message;
    if (request.header.msg_type === "execute_request") {
      queue.push({ outlet, request });
      void work();
    } else void handle(kernel, reply, outlet, request);
  };
}

/** Publishes busy before and idle after, whatever happens between. @see Jupyter messaging, "Kernel status". */
async function withBusyStatus<T>(kernel: KernelState, request: Message, work: () => Promise<T>): Promise<T> {
  kernel.publish(request.header, "status", { execution_state: "busy" });
  try {
    return await work();
  } finally {
    kernel.publish(request.header, "status", { execution_state: "idle" });
  }
}

/** An unknown request gets busy and idle and no reply; one that fails gets an error reply. */
async function handle(
  kernel: KernelState,
  reply: ReplyTo,
  outlet: OutgoingChannel,
  request: Message,
): Promise<void> {
  const type = request.header.msg_type;
  const handler = Object.hasOwn(handlers, type) ? handlers[type] : undefined;
  await withBusyStatus(kernel, request, async () => {
    const content = await answer(handler, kernel, request);
    if (content !== undefined) reply(outlet, request, type.replace(/_request$/, "_reply"), content);
  });
}

async function answer(
  handler: Handler | undefined,
  kernel: KernelState,
  request: Message,
): Promise<object | undefined> {
  try {
    return await handler?.(kernel, request);
  } catch (cause) {
    return { status: "error", ...errorReport(cause, "", "this request", kernel.sources) };
  }
}
