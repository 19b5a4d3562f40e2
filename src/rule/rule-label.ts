import type { Rule } from "./rule.js";

/**
 * What a rule is called in a title, table or sentence: its name, or its lines in one, without comments.
 *
 * @example ruleLabel(recurrence("ΔN = r*N*(1 - N/K)", { name: "crowding" })); // "crowding"
 */
export function ruleLabel({ name, text }: Rule): string {
  return name ?? oneLine(text);
}

/**
 * A rule's label, and its lines as well where the label is a name.
 *
 * @example ruleLabelWithText(recurrence("N[t+1] = R*N", { name: "growth" })); // "growth (N[t+1] = R*N)"
 */
export function ruleLabelWithText({ name, text }: Rule): string {
  return name === undefined ? oneLine(text) : `${name} (${oneLine(text)})`;
}

function oneLine(text: string): string {
  const lines = text.split("\n").map((line) => line.replace(/#.*/u, "").trim());
  return lines.filter((line) => line !== "").join("; ");
}
