import { Interrupted } from "../cells/cell-error.js";
import { inputNotAllowedError } from "../errors.js";
import { currentRun } from "../output/run.js";
import type { Message } from "../protocol/message.js";

/** Input prompts to the user of the front end, one after the other. */
export interface InputQuestions {
  readonly ask: (prompt?: string, options?: { readonly password?: boolean }) => Promise<string>;
  readonly answer: (message: Message) => void;
  /** Rejects the pending prompt: its cell has ended, and no answer will come. */
  readonly abandon: () => void;
}

interface PendingQuestion {
  readonly answered: (text: string) => void;
  readonly abandoned: (cause: Error) => void;
}

/** @see Jupyter messaging, "Messages on the stdin (ROUTER/DEALER) channel". */
export function inputQuestions(send: (request: Message, content: object) => void): InputQuestions {
  let pending: PendingQuestion | undefined;
  let turn: Promise<unknown> = Promise.resolve();
  return {
    ask: (prompt = "", options = {}) => {
      const run = currentRun();
      if (run === undefined || !run.allowsInput) return Promise.reject(inputNotAllowedError());
      const asked = turn.then(async () => {
        await run.output.drained();
        send(run.request, { prompt: String(prompt), password: options.password === true });
        return new Promise<string>((answered, abandoned) => {
          pending = { answered, abandoned };
        });
      });
      // The next prompt does not depend on how this one ended.
      turn = asked.catch(() => undefined);
      return asked;
    },
    answer: ({ content }) => {
      const given = pending;
      pending = undefined;
      given?.answered(String(content["value"] ?? ""));
    },
    abandon: () => {
      pending?.abandoned(new Interrupted());
      pending = undefined;
    },
  };
}
