interface Sends {
  send(frames: Uint8Array[]): Promise<void>;
}

/** A socket takes one send at a time: this keeps the order and waits for each before the next. */
export interface SerialSender {
  readonly send: (frames: Uint8Array[]) => void;
  /** Resolves when everything given so far has been handed to the socket. */
  readonly drained: () => Promise<void>;
}

export function serialSender(socket: Sends): SerialSender {
  let last: Promise<void> = Promise.resolve();
  return {
    send: (frames) => {
      // A receiver that has gone away must not stop what is sent to the others.
      last = last.then(() => socket.send(frames)).catch(() => undefined);
    },
    drained: () => last,
  };
}
