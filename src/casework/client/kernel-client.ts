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

type Outlet = "shell" | "control" | "stdin";

/** The client's end of the protocol's channels. */
export interface KernelClient {
  /** Sends a request and tells its message id. */
  readonly send: (outlet: Outlet, type: string, content: object, parent?: Message) => string;
  /** Hears every message that comes, with the channel it came by. Returns how to stop hearing. */
  readonly hear: (listener: (channel: Outlet | "iopub", message: Message) => void) => () => void;
  readonly close: () => Promise<void>;
}

/** A kernel that is starting has not bound its sockets yet. */
const reconnectInterval = 20;

/** Connects to a kernel. The same routing id is used for shell and stdin, so that questions find their way. */
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
  const listeners = new Set<(channel: Outlet | "iopub", message: Message) => void>();
  const listen = async (channel: Outlet | "iopub", socket: AsyncIterable<Buffer[]>): Promise<void> => {
    const decode = decoder(signature);
    for await (const frames of socket) {
      const message = decode(frames);
      if (message) for (const listener of listeners) listener(channel, message);
    }
  };
  void listen("iopub", iopub);
  for (const channel of ["shell", "control", "stdin"] as const) void listen(channel, sockets[channel]);

  return {
    send: (outlet, type, content, parent) => {
      const header = newHeader(type);
      const message = { identities: [], header, parent: parent?.header ?? {}, metadata: {}, buffers: [] };
      senders[outlet].send(framesOf(envelope({ ...message, content: { ...content } }), signature));
      return header.msg_id;
    },
    hear: (listener) => {
      listeners.add(listener);
      return () => void listeners.delete(listener);
    },
    close: async () => {
      await Promise.all(Object.values(senders).map((sender) => sender.drained()));
      for (const socket of [...Object.values(sockets), iopub]) socket.close();
    },
  };
}
