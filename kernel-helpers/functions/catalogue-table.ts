import { type Rule, rules } from "../../src/rule/index.js";
import { type Table, table } from "../tables/index.js";

type Makers = Readonly<Record<string, (options?: unknown) => Rule>>;

/** Options of the makers that cannot do without one, as written in the table. */
const needed: Readonly<Record<string, { readonly written: string; readonly options: unknown }>> = {
  inventory: { written: "{ lag: 1 }", options: { lag: 1 } },
  gapCorrection: { written: "{ lag: 1 }", options: { lag: 1 } },
  perishable: { written: "{ life: 2 }", options: { life: 2 } },
  delayedDensity: { written: "{ lag: 1 }", options: { lag: 1 } },
  adultsAndRecruits: { written: "{ lag: 1 }", options: { lag: 1 } },
  ages: { written: "{ ages: 2 }", options: { ages: 2 } },
  stages: { written: '{ stages: ["a", "b"] }', options: { stages: ["a", "b"] } },
};

/** The catalogue as a table: how each rule is called, what it is, and its text. */
export function catalogueTable(): Table {
  return table({
    title: "Rules with a name",
    columns: [
      { key: "call", label: "Call", kind: "text" },
      { key: "title", label: "Rule", kind: "text" },
      { key: "text", label: "Text", kind: "text" },
    ],
    rows: Object.entries(rules as unknown as Makers).map(([name, make]) => {
      const rule = make(needed[name]?.options);
      return {
        call: `rules.${name}(${needed[name]?.written ?? ""})`,
        title: rule.named?.title ?? "",
        text: rule.text.split("\n").join("; "),
      };
    }),
    notes: [
      "Each call gives a rule, which shows its range, rest levels, source and remarks. Options are those of recurrence(...).",
    ],
  });
}
