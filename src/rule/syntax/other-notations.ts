import { suggestion } from "../errors.js";
import { ruleFunctions } from "../functions.js";

/** Functions of textbooks and other languages, and how the rule language writes them. */
const otherFunctions: ReadonlyMap<string, string> = new Map([
  ["ln", "For the natural logarithm, write log(x)."],
  ["loge", "For the natural logarithm, write log(x)."],
  ["lg", "For the logarithm to base 10, write log10(x)."],
  ["log2", "For the logarithm to base 2, write log(x)/log(2)."],
  ["log1p", "Write log(1 + x)."],
  ["expm1", "Write exp(x) - 1."],
  ["pow", "For a power, write x^y."],
  ["power", "For a power, write x^y."],
  ["sqr", "For a square, write x^2."],
  ["square", "For a square, write x^2."],
  ["sgn", "Write sign(x)."],
  ["fabs", "Write abs(x)."],
  ["ceiling", "Write ceil(x)."],
  ["int", "To round down, write floor(x)."],
  ["trunc", "To round down, write floor(x)."],
  ["arcsin", "Write asin(x)."],
  ["ifelse", "Write if(condition, a, b)."],
  ["iif", "Write if(condition, a, b)."],
  ["where", "Write if(condition, a, b)."],
  ["maximum", "Write max(a, b)."],
  ["minimum", "Write min(a, b)."],
  ["diff", "For the change of a state, start a line with ΔN = ..."],
  ["delta", "For the change of a state, start a line with ΔN = ..."],
]);

const periodInRoundBrackets = /^\s*t\s*(?:([+-])\s*(\d+)\s*)?\)/u;

const index = (name: string, sign = "", count = ""): string => `${name}[t${sign}${count}]`;

/** What to write instead of a call of something that is not a function; `from` is the place after its bracket. */
export function callRemedy(text: string, from: number, name: string): string {
  const other = otherFunctions.get(name.toLowerCase());
  if (other !== undefined) return other;
  const period = periodInRoundBrackets.exec(text.slice(from));
  if (period !== null) return `Periods go in square brackets: write ${index(name, period[1], period[2])}.`;
  const functions = ruleFunctions.map((one) => one.name);
  return `For a product, write ${name}*( ... ).${suggestion(name, functions)}`;
}

const lineForms: readonly (readonly [RegExp, (name: string) => string])[] = [
  [/^d(?<name>[\p{L}\p{N}_]+)\s*\/\s*dt\b/u, (name) => `For the change per period, write Δ${name} = ...`],
  [
    /^(?<name>[\p{L}\p{N}_]+)\s*\(\s*t\s*\+\s*1\s*\)/u,
    (name) => `Periods go in square brackets: write ${name}[t+1] = ...`,
  ],
  [/^(?<name>[\p{L}\p{N}_]+)_t\s*\+\s*1\b/u, (name) => `For the next value, write ${name}[t+1] = ...`],
];

/** What to write instead of a line that begins in the notation of a textbook; undefined when it does not. */
export function lineRemedy(text: string, start: number): string | undefined {
  for (const [form, remedy] of lineForms) {
    const found = form.exec(text.slice(start));
    if (found !== null) return remedy(found.groups!["name"]!);
  }
  return undefined;
}

/** What to write instead of N_{t+1} or N_{max}, of which the bracket at `start` is one. */
export function subscriptRemedy(text: string, start: number): string | undefined {
  const name = /([\p{L}][\p{L}\p{N}]*)_$/u.exec(text.slice(0, start))?.[1];
  const inside = /^\{\s*([^{}\n]*?)\s*\}/u.exec(text.slice(start))?.[1];
  if (name === undefined || inside === undefined) return undefined;
  const period = periodInRoundBrackets.exec(`${inside})`);
  if (period !== null) return `Periods go in square brackets: write ${index(name, period[1], period[2])}.`;
  return `Write ${name}_${inside.replace(/[^\p{L}\p{N}]+/gu, "_")}.`;
}
