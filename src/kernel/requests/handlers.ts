import type { Message } from "../protocol/message.js";
import { commInfo, commOpen } from "./comms.js";
import { complete } from "./complete.js";
import { history } from "./history.js";
import { inspect } from "./inspect.js";
import { isComplete } from "./is-complete.js";
import type { KernelState } from "./kernel-state.js";

/** Handles a request; returns the content of the reply, or nothing for messages without one. */
export type Handler = (kernel: KernelState, request: Message) => object | undefined | Promise<object>;

/** Handlers of all requests except those answered by the transport thread and `execute_request`, which is queued. */
export const handlers: Readonly<Record<string, Handler>> = {
  complete_request: complete,
  inspect_request: inspect,
  is_complete_request: isComplete,
  history_request: history,
  comm_info_request: commInfo,
  comm_open: (kernel, request) => {
    commOpen(kernel, request);
    return undefined;
  },
};
