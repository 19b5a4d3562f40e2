import {
  eventOrder,
  type NamedRule,
  type Rule,
  ruleLanguage,
  ruleTex,
  ruleText,
  stateBounds,
} from "../../src/rule/index.js";
import { type Bundle, showing, type Table, table } from "../tables/index.js";
import { shownTogether } from "./shown-together.js";

const number = { kind: "number", digits: 6 } as const;

function namesTable(rule: Rule): Table {
  const lines = ruleText(rule).split("\n").join("; ");
  const meanings = rule.named?.quantities ?? {};
  return table({
    title: rule.name === undefined ? lines : `${rule.name}: ${lines}`,
    columns: [
      { key: "name", label: "Name", kind: "text" },
      { key: "role", label: "Role", kind: "text" },
      { key: "unit", label: "Unit", kind: "text" },
      ...(rule.named === undefined ? [] : [{ key: "meaning", label: "Meaning", kind: "text" } as const]),
      { key: "lowest", label: "Lowest", ...number },
      { key: "highest", label: "Highest", ...number },
    ],
    rows: ruleLanguage(rule).names.map(({ name, role, unit }) => ({
      name,
      role,
      unit: unit === "" ? "none stated" : unit,
      meaning: meanings[name]?.meaning ?? "worked out inside the period",
      lowest: rule.bounds[name]?.[0] ?? "open",
      highest: rule.bounds[name]?.[1] ?? "open",
    })),
    notes: [
      `Order of events: ${eventOrder(rule)}.`,
      ...boundNotes(rule),
      ...rule.findings.map(({ message }) => message),
    ],
  });
}

/** What becomes of a path that passes a bound of a state. */
function boundNotes(rule: Rule): readonly string[] {
  const notes = stateBounds(rule).map(({ low, high, absorbsLow, absorbsHigh }, s) => {
    const state = rule.states[s]!;
    const sides = [
      { bound: low, side: "below", absorbs: absorbsLow },
      { bound: high, side: "above", absorbs: absorbsHigh },
    ].filter(({ bound }) => Number.isFinite(bound));
    return sides.map(({ bound, side, absorbs }) =>
      absorbs
        ? `Where ${state} would be ${side} ${bound} it becomes ${bound} and stays there.`
        : `A path ends where ${state} would be ${side} ${bound}.`,
    );
  });
  return notes.flat();
}

const under = (when: string | undefined): string => (when === undefined ? "always" : when);
const byState = (values: Readonly<Record<string, string>>): string =>
  Object.entries(values)
    .map(([state, text]) => `${state} = ${text}`)
    .join(", ");

function knownTable(named: NamedRule): Table {
  const rests = named.equilibria.map(({ at, multiplier, when }) => ({
    what: "rest level",
    formula: byState(at),
    slope: multiplier ?? "of the system",
    when: under(when),
  }));
  const forms = named.closedForms.map(({ values, when }) => ({
    what: "after t periods",
    formula: byState(values),
    slope: "does not apply",
    when: under(when),
  }));
  const range =
    named.validWhen.length === 0 ? [] : [`It means what it says where ${named.validWhen.join("; ")}.`];
  return table({
    title: named.title,
    columns: [
      { key: "what", label: "Known", kind: "text" },
      { key: "formula", label: "Formula", kind: "text" },
      { key: "slope", label: "Slope there", kind: "text" },
      { key: "when", label: "Where", kind: "text" },
    ],
    rows: [...rests, ...forms],
    notes: [...range, named.remarks, `Source: ${named.source}.`],
  });
}

/** Makes a rule ready for a reader: its display, and nothing left to change in it. It stays the rule that was compiled. */
export function presentRule(rule: Rule): Rule {
  return showing(rule, () => showRule(rule));
}

/** A rule as a reader sees it: its lines, its names, what is known of it, and its TeX for a paper. */
async function showRule(rule: Rule): Promise<Bundle> {
  const parts = rule.named === undefined ? [] : [knownTable(rule.named)];
  const bundle = await shownTogether([namesTable(rule), ...parts]);
  return { ...bundle, "text/latex": `$$\\begin{gathered}\n${ruleTex(rule)}\n\\end{gathered}$$` };
}
