import type { StringCompletion, StringLanguage } from "../kernel/index.js";
import {
  type RecurrenceOptions,
  type Rule,
  type RuleLanguage,
  recurrence,
  ruleLanguage,
} from "../rule/index.js";
import { catalogueTexts } from "./catalogue-texts.js";
import { wordAt } from "./word-at.js";

/** Completion, help and errors inside the text of `recurrence("...")`. */
export const ruleTextLanguage: StringLanguage = {
  matches: (callee, argument) => argument === 0 && /(^|\.)recurrence$/.test(callee),
  complete: (text, position) => {
    if (/^\s*[a-z]*$/i.test(text)) return wholeRules(text);
    const word = wordAt(text, position);
    const offered = offers(text, word.text).filter((one) => one.text.startsWith(word.before));
    return { start: word.start, end: word.end, items: offered };
  },
  inspect: (text, position) => about(wordAt(text, position).text, languageOf(text)) ?? aboutWhole(text),
  check: (text, [given]) => {
    const options = declared(given);
    if (options === undefined) return [];
    const failed = attempt(text, options);
    return failed instanceof Error ? [diagnostic(failed, text)] : [];
  },
};

/** An empty text, or a single word, can be completed to a catalogue rule. */
function wholeRules(text: string): ReturnType<StringLanguage["complete"]> {
  const begun = text.trim().toLowerCase();
  const fitting = catalogueTexts().filter(({ name }) => name.toLowerCase().startsWith(begun));
  const items = fitting.map((one) => ({ text: one.text, kind: `rule ${one.name}` }));
  return { start: 0, end: text.length, items };
}

function aboutWhole(text: string): string | undefined {
  const rule = catalogueTexts().find((one) => one.text === text.trim());
  return rule && `**${rule.title}** (\`rules.${rule.name}()\`)\n\n${rule.remarks}`;
}

/** The options that decide the role of a name; `undefined` when they are computed in the cell. */
function declared(given: unknown): RecurrenceOptions | undefined {
  if (given === undefined) return {};
  if (typeof given !== "object" || given === null) return undefined;
  const wanted = Object.entries(given).filter(([name]) => name === "parameters" || name === "inputs");
  return wanted.every(([, value]) => value !== undefined) ? Object.fromEntries(wanted) : undefined;
}

function attempt(text: string, options: RecurrenceOptions): Rule | Error {
  try {
    return recurrence(text, options);
  } catch (cause) {
    return cause as Error;
  }
}

function diagnostic(error: Error, text: string): { start: number; end: number; text: string } {
  const { start, end } = (Reflect.get(error, "facts") ?? {}) as {
    readonly start?: number;
    readonly end?: number;
  };
  // The message has an excerpt with carets; here the cell itself is marked.
  const [wrong = error.message, ...rest] = error.message.split("\n");
  const remedy = rest.filter((line) => !line.startsWith("    "));
  return { start: start ?? 0, end: end ?? text.length, text: [wrong, ...remedy].join(" ") };
}

function languageOf(text: string): RuleLanguage {
  const read = attempt(text, {});
  return read instanceof Error ? ruleLanguage() : ruleLanguage(read);
}

function offers(text: string, present: string): readonly StringCompletion[] {
  const { functions, words, names } = languageOf(text);
  const known = new Set([...functions, ...words, ...names].map(({ name }) => name));
  // A text that is being typed may not be a valid rule; then its words are its names.
  const typed = [...text.matchAll(/[\p{L}_][\p{L}\p{N}_]*/gu)].map(([name]) => name.replace(/^Δ/, ""));
  const others = new Set(typed.filter((name) => name !== present && name !== "" && !known.has(name)));
  return [
    ...names.map(({ name, role }) => ({ text: name, kind: role })),
    ...[...others].map((name) => ({ text: name, kind: "name" })),
    ...functions.map(({ name }) => ({ text: name, kind: "function" })),
    ...words.map(({ name }) => ({ text: name, kind: "keyword" })),
  ];
}

function about(word: string, { functions, words, names }: RuleLanguage): string | undefined {
  const callable = functions.find(({ name }) => name === word);
  if (callable) return `\`${callable.usage}\`\n\n${callable.meaning}`;
  const reserved = words.find(({ name }) => name === word);
  if (reserved) return `\`${reserved.name}\`\n\n${reserved.meaning}`;
  const own = names.find(({ name }) => name === word.replace(/^Δ/, ""));
  return own && `\`${own.name}\`\n\n${own.role} of this rule${own.unit === "" ? "" : `, in ${own.unit}`}`;
}
