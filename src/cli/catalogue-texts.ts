import { type Rule, rules } from "../rule/index.js";

/** A catalogue rule as text for a string of one line. */
export interface CatalogueText {
  readonly name: string;
  readonly title: string;
  readonly text: string;
  readonly remarks: string;
}

let known: readonly CatalogueText[] | undefined;

/** The catalogue rules of one line that need no options; read once. */
export function catalogueTexts(): readonly CatalogueText[] {
  known ??= Object.entries(rules).flatMap(([name, make]) => {
    const rule = withoutArguments(make as () => Rule);
    if (rule?.named === undefined || rule.inputs.length > 0 || /["\n]/.test(rule.text)) return [];
    return [{ name, title: rule.named.title, text: rule.text, remarks: rule.named.remarks }];
  });
  return known;
}

/** The rule; undefined when it needs a lag or a number of stages. */
function withoutArguments(make: () => Rule): Rule | undefined {
  try {
    return make();
  } catch {
    return undefined;
  }
}
