import type { Fit } from "../../estimate/index.js";
import { labelAt, type PeriodAxis, periodsAfter, periodWords } from "../../record/index.js";
import { type Rule, ruleLabel } from "../../rule/index.js";

/** The record that an answer stands on: "the record of 58 values to hour 240". */
function recordWords(fit: Fit): string {
  const { groups, axis } = fit.observations;
  const count = groups.reduce(
    (sum, group) =>
      sum + Object.values(group.values).reduce((n, values) => n + values.filter(Number.isFinite).length, 0),
    0,
  );
  const last = groups.map((group) => periodsAfter(axis, group.axis)! + group.index[group.index.length - 1]!);
  return `the record of ${count} values to ${periodWords(axis, Math.max(...last))}`;
}

/** Longest rule that is named in a sentence. */
const longest = 60;

/** " "crowding"", or " N[t+1] = R*N": a rule behind the word, where it is short enough to be read there. */
function ruleWords(rule: Rule): string {
  const label = ruleLabel(rule);
  if (label.length > longest || label.includes(";")) return "";
  return rule.name === undefined ? ` ${label}` : ` "${label}"`;
}

/** What must hold for an answer: the record's going on, or the rule; and inputs that go as planned. */
export function conditionWords(rule: Rule, fit: Fit | undefined): string {
  const planned =
    rule.inputs.length === 0
      ? ""
      : `${rule.inputs.join(" and ")} ${rule.inputs.length === 1 ? "goes" : "go"} as planned and `;
  const named = ruleWords(rule);
  if (fit !== undefined)
    return `${planned}it goes on as in ${recordWords(fit)}${named && `, by the rule${named}`}`;
  return `${planned}the rule${named}${rule.parameters.length === 0 ? " holds" : " and its parameters hold"}`;
}

/** A difference in periods that a search or a sum leaves is none. */
const rounding = 1e-6;

/** The label of the first period at or past a place on the axis: a record has no date between its periods. */
export function firstPeriodLabel(axis: PeriodAxis, place: number): string {
  return labelAt(axis, Math.ceil(place - rounding));
}

/** How a group is named: "flask B", or "N" where there is a single one. */
export function groupWords(fit: Fit | undefined, group: string): string {
  const [column] = fit?.observations.by ?? [];
  return column === undefined || group.startsWith(column) ? group : `${column} ${group}`;
}
