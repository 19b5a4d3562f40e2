/** Sends one message of a cell: its type and its content. */
export type Publish = (type: string, content: object) => void;

/**
 * The outputs of one cell in the order of their creation. An output may still be pending, such as a picture being
 * drawn; later outputs wait for it.
 */
export interface OutputQueue {
  readonly add: (type: string, content: object | Promise<object>) => void;
  readonly print: (name: "stdout" | "stderr", text: string) => void;
  /** Resolves when everything added so far has been published. */
  readonly drained: () => Promise<void>;
}

const maxHeldCharacters = 8_192;
const maxHeldMs = 25;

export function outputQueue(publish: Publish, failed: (cause: unknown) => object): OutputQueue {
  let last: Promise<void> | undefined;
  let held: { name: string; text: string; since: number } | undefined;

  const flush = (): void => {
    if (held === undefined) return;
    const { name, text } = held;
    held = undefined;
    enqueue("stream", { name, text });
  };
  const enqueue = (type: string, content: object | Promise<object>): void => {
    if (last === undefined && !(content instanceof Promise)) {
      publish(type, content);
      return;
    }
    const turn = (last ?? Promise.resolve())
      .then(() => content)
      .then((ready) => publish(type, ready))
      .catch((cause) => publish("stream", failed(cause)));
    last = turn;
    void turn.then(() => {
      if (last === turn) last = undefined;
    });
  };

  return {
    add: (type, content) => {
      flush();
      enqueue(type, content);
    },
    // Text is buffered briefly and sent in chunks, because a message per line would overload the front end. The clock
    // is checked at each write, since a busy loop never lets a timer run.
    print: (name, text) => {
      if (held !== undefined && held.name !== name) flush();
      if (held === undefined) {
        held = { name, text, since: performance.now() };
        setImmediate(flush);
        return;
      }
      held.text += text;
      if (held.text.length > maxHeldCharacters || performance.now() - held.since > maxHeldMs) flush();
    },
    drained: async () => {
      flush();
      while (last !== undefined) await last;
    },
  };
}
