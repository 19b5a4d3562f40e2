/** A parsed command line: words in order, and options. */
export interface Arguments {
  readonly words: readonly string[];
  /** Options that take a value: `--out folder` or `--out=folder`; the last one counts. */
  readonly options: Readonly<Record<string, string>>;
  /** `--set name=value`, any number of times. */
  readonly set: Readonly<Record<string, string>>;
}

const known = ["out", "set", "prefix"];

/** A mistake on the command line. */
export class UsageError extends Error {}

/** @throws {UsageError} for an unknown option or one without a value. */
export function readArguments(given: readonly string[]): Arguments {
  const words: string[] = [];
  const options: Record<string, string> = {};
  const set: Record<string, string> = {};
  const rest = [...given];
  for (let word = rest.shift(); word !== undefined; word = rest.shift()) {
    if (!word.startsWith("--")) {
      words.push(word);
      continue;
    }
    const [name = "", attached] = word.slice(2).split(/=(.*)/s);
    const value = attached ?? rest.shift();
    if (!known.includes(name))
      throw new UsageError(`Unknown option --${name}. Options: --${known.join(", --")}.`);
    if (value === undefined)
      throw new UsageError(`Option --${name} needs a value, such as --${name} ${example[name]}.`);
    if (name === "set") addAssignment(set, value);
    else options[name] = value;
  }
  return { words, options, set };
}

const example: Readonly<Record<string, string>> = { out: "folder", set: "name=value", prefix: "folder" };

function addAssignment(set: Record<string, string>, text: string): void {
  const at = text.indexOf("=");
  if (at < 1) throw new UsageError(`--set ${text} has no value. Write --set name=value.`);
  set[text.slice(0, at)] = text.slice(at + 1);
}
