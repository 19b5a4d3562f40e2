import { Publisher, Reply, Router } from "zeromq";
import { address, type Connection } from "../protocol/connection.js";
import { type SerialSender, serialSender } from "../protocol/serial-sender.js";
import { signatureOf } from "../protocol/signature.js";
import { type Decoder, decoder, type Envelope, framesOf } from "../protocol/wire.js";
import type { OutgoingChannel } from "./port-messages.js";

type Incoming = "shell" | "control" | "stdin";

/** The five bound sockets of a kernel. */
export interface Channels {
  readonly send: (outlet: OutgoingChannel, sealed: Envelope) => void;
  readonly listen: (
    channel: Incoming,
    receive: (message: NonNullable<ReturnType<Decoder>>) => void,
  ) => Promise<void>;
  readonly echoHeartbeat: () => Promise<void>;
  /** Sends what is queued, then closes every socket. */
  readonly close: () => Promise<void>;
}

const lingerMs = 1_000;

/** Binds only the address that the connection file names. */
export async function bindChannels(connection: Connection): Promise<Channels> {
  const signature = signatureOf(connection.key, connection.signature_scheme);
  const decode = decoder(signature);
  const sockets = { shell: new Router(), control: new Router(), stdin: new Router(), iopub: new Publisher() };
  const heartbeat = new Reply();
  // A slow reader must not lose outputs: nothing is dropped, and memory is the only limit.
  sockets.iopub.sendHighWaterMark = 0;
  for (const socket of [...Object.values(sockets), heartbeat]) socket.linger = lingerMs;
  await Promise.all([
    sockets.shell.bind(address(connection, "shell_port")),
    sockets.control.bind(address(connection, "control_port")),
    sockets.stdin.bind(address(connection, "stdin_port")),
    sockets.iopub.bind(address(connection, "iopub_port")),
    heartbeat.bind(address(connection, "hb_port")),
  ]);
  const senders: Record<OutgoingChannel, SerialSender> = {
    shell: serialSender(sockets.shell),
    control: serialSender(sockets.control),
    stdin: serialSender(sockets.stdin),
    iopub: serialSender(sockets.iopub),
  };
  return {
    send: (outlet, sealed) => senders[outlet].send(framesOf(sealed, signature)),
    listen: async (channel, receive) => {
      for await (const frames of sockets[channel]) {
        const message = decode(frames);
        if (message) receive(message);
      }
    },
    echoHeartbeat: async () => {
      for await (const frames of heartbeat) await heartbeat.send(frames);
    },
    close: async () => {
      await Promise.all(Object.values(senders).map((sender) => sender.drained()));
      for (const socket of [...Object.values(sockets), heartbeat]) socket.close();
    },
  };
}
