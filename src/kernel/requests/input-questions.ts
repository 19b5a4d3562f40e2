import { Interrupted } from "../cells/cell-error.js";
import { presentRun } from "../output/run.js";
import type { Message } from "../protocol/message.js";
import { inputNotAllowed } from "../refusals.js";

/** Questions to the person at the front end, asked one after the other. */
export interface InputQuestions {
  readonly ask: (prompt?: string, options?: { readonly password?: boolean }) => Promise<string>;
  readonly answer: (message: Message) => void;
  /** Gives up what is still unanswered: its cell has ended, and nobody will answer. */
  readonly abandon: () => void;
}

interface Waiting {
  readonly answered: (text: string) => void;
  readonly abandoned: (cause: Error) => void;
}

/** @see Jupyter messaging, "Messages on the stdin (ROUTER/DEALER) channel". */
export function inputQuestions(send: (request: Message, content: object) => void): InputQuestions {
  let waiting: Waiting | undefined;
  let turn: Promise<unknown> = Promise.resolve();
  return {
    ask: (prompt = "", options = {}) => {
      const run = presentRun();
      if (run === undefined || !run.allowsInput) return Promise.reject(inputNotAllowed());
      const asked = turn.then(async () => {
        await run.output.drained();
        send(run.request, { prompt: String(prompt), password: options.password === true });
        return new Promise<string>((answered, abandoned) => {
          waiting = { answered, abandoned };
        });
      });
      // The next question does not mind how this one ended.
      turn = asked.catch(() => undefined);
      return asked;
    },
    answer: ({ content }) => {
      const given = waiting;
      waiting = undefined;
      given?.answered(String(content["value"] ?? ""));
    },
    abandon: () => {
      waiting?.abandoned(new Interrupted());
      waiting = undefined;
    },
  };
}
