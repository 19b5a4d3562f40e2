import { functions } from "./functions.js";
import type { Kind } from "./option.js";
import { mustBe } from "./words-of-kind.js";

/** What a public function takes, as Markdown: a line an option, and a call that works; undefined for other names. */
export function helpText(name: string): string | undefined {
  const schema = functions.get(name);
  if (schema === undefined) return undefined;
  const options = Object.entries(schema.options?.fields ?? {}).map(([option, { need, says, kind }]) => {
    const required = need === "required" ? " (required)" : "";
    return `- \`${option}\`${required}: ${says}${choices(kind)}`;
  });
  const example = `*example*\n\`\`\`typescript\n${schema.example}\n\`\`\``;
  return options.length === 0 ? example : `*options*\n\n${options.join("\n")}\n\n${example}`;
}

const choices = (kind: Kind): string => (kind.is === "choice" ? ` One of ${mustBe(kind)}.` : "");
