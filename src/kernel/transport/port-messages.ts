import type { Message } from "../protocol/message.js";
import type { Envelope } from "../protocol/wire.js";

/** Channels that a message can leave by. */
export type Outlet = "shell" | "control" | "iopub" | "stdin";

/** What the kernel's own thread asks of the transport thread. */
export type ToTransport = { readonly kind: "send"; readonly outlet: Outlet; readonly sealed: Envelope };

/** What the transport thread tells the kernel's own thread. */
export type FromTransport =
  | { readonly kind: "request"; readonly outlet: "shell" | "control"; readonly message: Message }
  | { readonly kind: "input"; readonly message: Message }
  | { readonly kind: "interrupt"; readonly count: number }
  | { readonly kind: "shutdown" };

/** What the transport thread is started with. */
export interface TransportData {
  readonly connection: import("../protocol/connection.js").Connection;
  readonly session: string;
  readonly kernelInfo: Readonly<Record<string, unknown>>;
  readonly pause: Int32Array;
}
