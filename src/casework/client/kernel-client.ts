import { randomUUID } from "node:crypto";
import { Dealer, Subscriber } from "zeromq";
import {
  address,
  type Connection,
  decoder,
  envelope,
  framesOf,
  headersOf,
  type Message,
  serialSender,
  signatureOf,
} from "../../kernel/index.js";

type RequestChannel = "shell" | "control" | "stdin";

/** The client side of the protocol's channels. */
export interface KernelClient {
  /** Sends a request and returns its message id. */
  readonly send: (outlet: RequestChannel, type: string, content: object, parent?: Message) => string;
  /** Calls the listener for every message, with its channel. Returns a function that removes the listener. */
  readonly listen: (listener: (channel: RequestChannel | "iopub", message: Message) => void) => () => void;
  readonly close: () => Promise<void>;
}

/** Short, because a kernel that is starting has not bound its sockets yet. */
const reconnectInterval = 20;

/** Connects to a kernel. The same routing id is used for shell and stdin, as input requests need. */
export function kernelClient(connection: Connection): KernelClient {
  const signature = signatureOf(connection.key, connection.signature_scheme);
  const routingId = randomUUID();
  const dealer = (): Dealer => new Dealer({ routingId, linger: 0, reconnectInterval });
  const sockets = { shell: dealer(), control: dealer(), stdin: dealer() };
  const iopub = new Subscriber({ linger: 0, receiveHighWaterMark: 0, reconnectInterval });
  iopub.subscribe();
  sockets.shell.connect(address(connection, "shell_port"));
  sockets.control.connect(address(connection, "control_port"));
  sockets.stdin.connect(address(connection, "stdin_port"));
  iopub.connect(address(connection, "iopub_port"));

  const senders = {
    shell: serialSender(sockets.shell),
    control: serialSender(sockets.control),
    stdin: serialSender(sockets.stdin),
  };
  const newHeader = headersOf("periodwise");
  const listeners = new Set<(channel: RequestChannel | "iopub", message: Message) => void>();
  const receiveFrom = async (
    channel: RequestChannel | "iopub",
    socket: AsyncIterable<Buffer[]>,
  ): Promise<void> => {
    const decode = decoder(signature);
    for await (const frames of socket) {
      const message = decode(frames);
      if (message) for (const listener of listeners) listener(channel, message);
    }
  };
  void receiveFrom("iopub", iopub);
  for (const channel of ["shell", "control", "stdin"] as const) void receiveFrom(channel, sockets[channel]);

  return {
    send: (outlet, type, content, parent) => {
      const header = newHeader(type);
      const message = { identities: [], header, parent: parent?.header ?? {}, metadata: {}, buffers: [] };
      senders[outlet].send(framesOf(envelope({ ...message, content: { ...content } }), signature));
      return header.msg_id;
    },
    listen: (listener) => {
      listeners.add(listener);
      return () => void listeners.delete(listener);
    },
    close: async () => {
      await Promise.all(Object.values(senders).map((sender) => sender.drained()));
      for (const socket of [...Object.values(sockets), iopub]) socket.close();
    },
  };
}
