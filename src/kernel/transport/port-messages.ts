import type { Message } from "../protocol/message.js";
import type { Envelope } from "../protocol/wire.js";

/** Channels on which messages are sent. */
export type OutgoingChannel = "shell" | "control" | "iopub" | "stdin";

/** Messages from the kernel's thread to the transport thread. */
export type ToTransport = {
  readonly kind: "send";
  readonly outlet: OutgoingChannel;
  readonly sealed: Envelope;
};

/** Messages from the transport thread to the kernel's thread. */
export type FromTransport =
  | { readonly kind: "request"; readonly outlet: "shell" | "control"; readonly message: Message }
  | { readonly kind: "input"; readonly message: Message }
  | { readonly kind: "interrupt"; readonly count: number }
  | { readonly kind: "shutdown" };

/** Start data of the transport thread. */
export interface TransportData {
  readonly connection: import("../protocol/connection.js").Connection;
  readonly session: string;
  readonly kernelInfo: Readonly<Record<string, unknown>>;
  readonly interruptFlag: Int32Array;
}
