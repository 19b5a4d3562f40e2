import { ModelError } from "../../src/numeric/index.js";

export function refuseNoCase(command: string): ModelError {
  return new ModelError(
    "no-case-open",
    `${command} needs an open case. Begin the notebook with openCase({ title, question, domain, seed }).`,
    { command },
  );
}

export function refuseUnanswered(): ModelError {
  return new ModelError(
    "case-not-answered",
    "The case has no answer yet. Give one with answer(`...`) before closeCase().",
  );
}

export function refuseEmptyAnswer(): ModelError {
  return new ModelError("empty-answer", "An answer is a sentence; an empty text was given.");
}
