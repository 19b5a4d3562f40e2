import { type Fit, type GroupFit, problemOf } from "../../src/estimate/index.js";
import { labelAt } from "../../src/record/index.js";
import type { Rule } from "../../src/rule/index.js";
import { groupNamed, groupRequiredError } from "../results/index.js";
import { showing } from "../tables/index.js";
import { escapeHtml, joinSentences, list } from "../wording/index.js";
import type { Shown } from "./show.js";

/** What a question about a rule is asked of: the rule, or a fit, whose estimates it then takes. */
export type Subject = Rule | Fit;

/** Options of a question: for a fit, what it estimates may be left out, and one of several groups is named. */
export type OptionsFor<Asked extends Subject, Options> = Asked extends Fit ? FitOptionsOf<Options> : Options;

type FitOptionsOf<Options> = Omit<Options, "initial" | "group"> & {
  /** What to begin with instead of the first values of the fit. */
  readonly initial?: Options extends { readonly initial?: infer Initial } ? Initial : never;
  /** Of a fit with several groups: which one. */
  readonly group?: string;
};

/** What a result owes to a fit. */
export interface FromFit {
  readonly fit: Fit;
  /** Which estimates were taken, and those that the record does not determine. */
  readonly notes: readonly string[];
}

/** The result of a question: of a fit, with what it owes to it. */
export type ResultFor<Asked extends Subject, Result> = Asked extends Fit ? Result & FromFit : Result;

/** The group of a fit whose estimates are taken. */
export function groupOf({ groups }: Fit, name: string | undefined): GroupFit {
  if (name !== undefined) return groupNamed("fit", groups, name);
  const [only] = groups;
  const names = groups.map(({ group }) => group);
  if (groups.length > 1) throw groupRequiredError(names);
  return only!;
}

/** Where the trajectory of a fit begins. */
export interface FittedStart {
  /** Its period in words. */
  readonly period: string;
  /** First values by state, oldest first where the rule reads past ones. */
  readonly initial: Readonly<Record<string, number | readonly number[]>>;
}

/** The fitted start of a trajectory; of steps the first recorded one; of a filter the state at the record's end. */
export function fittedStart(fit: Fit, group: GroupFit): FittedStart {
  const { kind, recorded, beginning } = problemOf(fit).group(group.group);
  const isKnown = (after: number): boolean => beginning(after).initial.every(Number.isFinite);
  const { period, initial } = beginning(kind === "state-space" ? undefined : recorded.index.find(isKnown));
  const { states, lags } = fit.rule;
  const values = states.map((state, slot) => {
    const past = lags.flatMap((kept, i) =>
      kept.state === state ? [{ ...kept, slot: states.length + i }] : [],
    );
    const all = [{ lag: 0, slot }, ...past].sort((a, b) => b.lag - a.lag).map((each) => initial[each.slot]!);
    return [state, all.length === 1 ? all[0]! : all] as const;
  });
  return { period: labelAt(recorded.axis, period), initial: Object.fromEntries(values) };
}

/** The first value of each state, without those before it. */
export function presentValues(fit: Fit, group: GroupFit): Readonly<Record<string, number>> {
  const all = Object.entries(fittedStart(fit, group).initial);
  return Object.fromEntries(all.map(([state, values]) => [state, [values].flat().at(-1)!]));
}

/** What an attractor takes of a fit: where it begins, and the estimate that it marks, with its interval. */
export function attractorValues(
  fit: Fit,
  group: GroupFit,
  { vary }: { readonly vary?: unknown },
): Readonly<Record<string, unknown>> {
  const [initial] = Object.values(presentValues(fit, group));
  const { value, profile: { lower, upper } = {} } = group.estimates.find(({ name }) => name === vary) ?? {};
  const isBounded = value !== undefined && lower !== undefined && upper !== undefined;
  return { initial, ...(isBounded && { estimate: { value, interval: [lower, upper] } }) };
}

/** Which estimates were taken, and what to make of those that the record leaves open. */
export function fitNotes(fit: Fit, group: GroupFit): readonly string[] {
  const who = group.group === "" ? "" : ` of "${group.group}"`;
  const values = fit.rule.parameters.map(
    (name) => `${name} ${Number(group.parameters[name]!.toPrecision(6))}`,
  );
  const open = group.estimates.filter(
    ({ role, standardError }) => role === "parameter" && standardError === undefined,
  );
  const names = open.map(({ name }) => name);
  return [
    `Worked out at the estimates${who}: ${list(values)}.`,
    ...(names.length === 0
      ? []
      : [
          `${list(names)} ${names.length === 1 ? "is" : "are"} not determined by this record: other values explain it as well and may lead elsewhere.`,
        ]),
  ];
}

/** Notes as a part of what a result shows. */
export function shownNotes(notes: readonly string[]): Shown {
  const text = joinSentences(...notes);
  return showing({ kind: "note" }, () => ({ "text/html": `<p>${escapeHtml(text)}</p>`, "text/plain": text }));
}
