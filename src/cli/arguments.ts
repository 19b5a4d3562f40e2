/** A command line, read: plain words in order, and options. */
export interface Arguments {
  readonly words: readonly string[];
  /** Options that take a value: `--out folder` or `--out=folder`; the last one counts. */
  readonly options: Readonly<Record<string, string>>;
  /** `--set name=value`, as often as wanted. */
  readonly set: Readonly<Record<string, string>>;
}

const known = ["out", "set", "prefix"];

/** @throws {Error} for an option that is not known or has no value. */
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
      throw new Error(`There is no option --${name}; there are --${known.join(", --")}.`);
    if (value === undefined)
      throw new Error(`The option --${name} needs a value, as in --${name} ${example[name]}.`);
    if (name === "set") addSetting(set, value);
    else options[name] = value;
  }
  return { words, options, set };
}

const example: Readonly<Record<string, string>> = { out: "folder", set: "name=value", prefix: "folder" };

function addSetting(set: Record<string, string>, text: string): void {
  const at = text.indexOf("=");
  if (at < 1) throw new Error(`--set ${text} has no value; write --set name=value.`);
  set[text.slice(0, at)] = text.slice(at + 1);
}
