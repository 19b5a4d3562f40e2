import { presentRun } from "../output/run.js";
import type { Message } from "../protocol/message.js";
import { inputNotAllowed } from "../refusals.js";

/** Questions to the person at the front end, asked one after the other. */
export interface InputQuestions {
  readonly ask: (prompt?: string, options?: { readonly password?: boolean }) => Promise<string>;
  readonly answer: (message: Message) => void;
}

/** @see Jupyter messaging, "Messages on the stdin (ROUTER/DEALER) channel". */
export function inputQuestions(send: (request: Message, content: object) => void): InputQuestions {
  const waiting = new Map<string, (answer: string) => void>();
  let turn: Promise<unknown> = Promise.resolve();
  return {
    ask: (prompt = "", options = {}) => {
      const run = presentRun();
      if (run === undefined || !run.allowsInput) return Promise.reject(inputNotAllowed());
      const asked = turn.then(async () => {
        await run.output.drained();
        send(run.request, { prompt: String(prompt), password: options.password === true });
        return new Promise<string>((resolve) => waiting.set(run.request.header.session, resolve));
      });
      turn = asked;
      return asked;
    },
    answer: (message) => {
      const resolve = waiting.get(message.header.session) ?? [...waiting.values()].at(-1);
      waiting.clear();
      resolve?.(String(message.content["value"] ?? ""));
    },
  };
}
