interface Sends {
  send(frames: Uint8Array[]): Promise<void>;
}

/** A socket accepts one send at a time: this queues them in order. */
export interface SerialSender {
  readonly send: (frames: Uint8Array[]) => void;
  /** Resolves when everything queued so far has been handed to the socket. */
  readonly drained: () => Promise<void>;
}

export function serialSender(socket: Sends): SerialSender {
  let last: Promise<void> = Promise.resolve();
  return {
    send: (frames) => {
      // A receiver that is gone must not block messages to the others.
      last = last.then(() => socket.send(frames)).catch(() => undefined);
    },
    drained: () => last,
  };
}
