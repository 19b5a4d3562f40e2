import type { Warning } from "../numeric/index.js";
import type { NamedRule } from "./catalogue/named-rule.js";
import { checkOptions } from "./check/check-options.js";
import type { Declared } from "./check/checked-rule.js";
import { memoryOf } from "./graph/build-graph.js";
import type { Bounds, RecurrenceOptions } from "./recurrence-options.js";
import type { Rule } from "./rule.js";
import { defineRule, keepDefinition } from "./rule-definition.js";
import type { AtBound } from "./state-bounds.js";
import { unitFindings } from "./units/unit-findings.js";

function copyOf<T>(given: Readonly<Record<string, T>> | undefined): Readonly<Record<string, T>> {
  const entries = Object.entries(given ?? {}).map(([name, value]) => [
    name,
    typeof value === "object" && value !== null
      ? Object.freeze(Array.isArray(value) ? [...value] : { ...value })
      : value,
  ]);
  return Object.freeze(Object.fromEntries(entries));
}

const hasMore = (bounds: Bounds): bounds is Extract<Bounds, { range: unknown }> => "range" in bounds;

const rangesOf = (bounds: RecurrenceOptions["bounds"] = {}): Record<string, readonly [number, number]> =>
  Object.fromEntries(Object.entries(bounds).map(([name, each]) => [name, hasMore(each) ? each.range : each]));

const atBoundsOf = (bounds: RecurrenceOptions["bounds"] = {}): Record<string, AtBound> =>
  Object.fromEntries(
    Object.entries(bounds).flatMap(([name, each]) => (hasMore(each) ? [[name, each.atBounds]] : [])),
  );

/** Reads, checks and keeps a rule; `named` is what the catalogue knows of it. */
export function makeRule(text: string, options: RecurrenceOptions, named?: NamedRule): Rule {
  const normal = text.normalize("NFC").replace(/\r\n?/gu, "\n");
  const declared: Declared = { parameters: options.parameters, inputs: options.inputs ?? [] };
  const definition = defineRule(normal, declared);
  const { checked } = definition;
  checkOptions(checked, options);
  const first = checked.statements.find(({ kind }) => kind !== "quantity")!;
  const findings: readonly Warning[] = Object.freeze([
    ...checked.findings,
    ...unitFindings(checked, options.units ?? {}),
  ]);
  const rule: Rule = Object.freeze({
    kind: "rule",
    text: normal,
    form: first.kind === "change" ? "change" : "next",
    states: Object.freeze([...checked.states]),
    memory: Object.freeze(memoryOf(checked).map((kept) => Object.freeze(kept))),
    quantities: Object.freeze([...checked.quantities]),
    inputs: Object.freeze([...checked.inputs]),
    parameters: Object.freeze([...checked.parameters]),
    units: copyOf(options.units),
    bounds: copyOf(rangesOf(options.bounds)),
    atBounds: copyOf(atBoundsOf(options.bounds)),
    start: copyOf(options.start),
    fixed: copyOf(options.fixed),
    initial: copyOf(options.initial),
    noise: copyOf(options.noise),
    findings,
    ...(named === undefined ? {} : { named }),
  });
  keepDefinition(rule, definition);
  return rule;
}
