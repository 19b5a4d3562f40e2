import { type Rule, rules } from "../rule/index.js";

/** A rule of the catalogue as a text that fits between two quotes. */
export interface CatalogueText {
  readonly name: string;
  readonly title: string;
  readonly text: string;
  readonly remarks: string;
}

let known: readonly CatalogueText[] | undefined;

/** The catalogue's rules of one line that need nothing said beside their text; read once. */
export function catalogueTexts(): readonly CatalogueText[] {
  known ??= Object.entries(rules).flatMap(([name, make]) => {
    const rule = withoutArguments(make as () => Rule);
    if (rule?.named === undefined || rule.inputs.length > 0 || /["\n]/.test(rule.text)) return [];
    return [{ name, title: rule.named.title, text: rule.text, remarks: rule.named.remarks }];
  });
  return known;
}

/** Rules for a given delay or number of stages cannot be made without it. */
function withoutArguments(make: () => Rule): Rule | undefined {
  try {
    return make();
  } catch {
    return undefined;
  }
}
