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

export function refuseUnknownTerm(
  name: string,
  nearest: readonly string[],
  known: readonly string[],
): ModelError {
  const hint =
    nearest.length > 0 ? `Did you mean "${nearest.join('" or "')}"?` : `Known: ${known.join(", ")}.`;
  return new ModelError("unknown-term", `There is no explanation of "${name}". ${hint}`, {
    name,
    nearest,
    known,
  });
}
