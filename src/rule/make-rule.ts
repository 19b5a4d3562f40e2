import { frozenCopy } from "../numeric/index.js";
import type { NamedRule } from "./catalogue/named-rule.js";
import type { RuleCatalogue } from "./catalogue/rules.js";
import { shortNames } from "./catalogue/short-names.js";
import { checkOptions } from "./check/check-options.js";
import type { Declarations } from "./check/checked-rule.js";
import { laggedStates } from "./graph/build-graph.js";
import type { Bounds, RecurrenceOptions } from "./recurrence-options.js";
import type { Rule } from "./rule.js";
import { defineRule, storeDefinition } from "./rule-definition.js";
import { unitFindings } from "./units/unit-findings.js";

const statesBehaviour = (bounds: Bounds): bounds is Extract<Bounds, { range: unknown }> => "range" in bounds;

/** What each entry gives, under the same name; entries that give nothing are left out. */
function mapped<T, U>(
  given: Readonly<Record<string, T>>,
  give: (each: T) => readonly U[],
): Readonly<Record<string, U>> {
  return Object.fromEntries(
    Object.entries(given).flatMap(([name, each]) => give(each).map((value) => [name, value])),
  );
}

/**
 * Reads and checks a rule; `named` is its catalogue entry.
 *
 * The options are copied: a rule must not change when the caller's objects do.
 */
export function makeRule(text: string, options: RecurrenceOptions, named?: NamedRule): Rule {
  const normal = text.normalize("NFC").replace(/\r\n?/gu, "\n");
  const declared: Declarations = { parameters: options.parameters, inputs: options.inputs ?? [] };
  const definition = defineRule(normal, declared);
  const { checked } = definition;
  checkOptions(checked, options);
  const first = checked.statements.find(({ kind }) => kind !== "quantity")!;
  const name =
    options.name?.trim().replace(/\s+/gu, " ") ?? (named && shortNames[named.name as keyof RuleCatalogue]);
  const {
    units = {},
    bounds: given = {},
    start = {},
    fixed = {},
    initial = {},
    noise = {},
  } = frozenCopy(options);
  const rule: Rule = {
    kind: "rule",
    ...(name !== undefined && { name }),
    text: normal,
    form: first.kind === "change" ? "change" : "next",
    states: [...checked.states],
    lags: laggedStates(checked),
    quantities: [...checked.quantities],
    inputs: [...checked.inputs],
    parameters: [...checked.parameters],
    units,
    bounds: mapped(given, (each) => [statesBehaviour(each) ? each.range : each]),
    atBounds: mapped(given, (each) => (statesBehaviour(each) ? [each.atBounds] : [])),
    start,
    fixed,
    initial,
    noise,
    findings: [...checked.findings, ...unitFindings(checked, units)],
    ...(named === undefined ? {} : { named }),
  };
  storeDefinition(rule, definition);
  return rule;
}
