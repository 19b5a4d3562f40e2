import type { Rule } from "./rule.js";

/**
 * Label of a rule in titles, tables and sentences: its name, otherwise its statements.
 *
 * @example ruleLabel(recurrence("ΔN = r*N*(1 - N/K)", { name: "crowding" })); // "crowding"
 */
export function ruleLabel(rule: Rule): string {
  return rule.name ?? ruleLines(rule);
}

/**
 * The statements of a rule on one line, without comments.
 *
 * @example ruleLines(recurrence("births = R*N   # a year\nN[t+1] = births")); // "births = R*N; N[t+1] = births"
 */
export function ruleLines({ text }: Rule): string {
  const lines = text.split("\n").map((line) => line.replace(/#.*/u, "").trim());
  return lines.filter((line) => line !== "").join("; ");
}
