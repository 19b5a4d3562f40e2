import type { Message } from "../protocol/message.js";
import type { KernelState } from "./kernel-state.js";

/**
 * This kernel has no comm targets: a comm that is opened is closed at once, and messages to unknown ones are ignored,
 * as the protocol requires.
 * @see Jupyter messaging, "Custom Messages".
 */
export function commInfo(): object {
  return { status: "ok", comms: {} };
}

export function commOpen(kernel: KernelState, request: Message): void {
  kernel.publish(request.header, "comm_close", { comm_id: request.content["comm_id"], data: {} });
}
