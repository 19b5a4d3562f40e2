import { randomUUID } from "node:crypto";

/** @see Jupyter messaging, "General message format: message header". */
export interface Header {
  readonly msg_id: string;
  readonly session: string;
  readonly username: string;
  readonly date: string;
  readonly msg_type: string;
  readonly version: string;
}

/** One message of the protocol, its frames already read. */
export interface Message {
  /** Routing ids of a ROUTER socket, or the topic on iopub. */
  readonly identities: readonly Uint8Array[];
  readonly header: Header;
  readonly parent: Header | Record<string, never>;
  readonly metadata: Readonly<Record<string, unknown>>;
  readonly content: Readonly<Record<string, unknown>>;
  readonly buffers: readonly Uint8Array[];
}

export const protocolVersion = "5.4";

/** Makes the headers of one process: one session id, a fresh message id each time. */
export function headersOf(username: string, session: string = randomUUID()): (type: string) => Header {
  return (msg_type) => ({
    msg_id: randomUUID(),
    session,
    username,
    date: new Date().toISOString(),
    msg_type,
    version: protocolVersion,
  });
}
