#!/usr/bin/env node
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { installationFolder } from "../kernel/index.js";
import { readArguments, UsageError } from "./arguments.js";
import { commands, usage } from "./commands.js";

const misuse = 2;

/** Reads the command line and runs the command. Exit status: 0, 1 for a failure, 2 for a mistake on the command line. */
async function main(): Promise<void> {
  const [name = "help", ...rest] = process.argv.slice(2);
  if (["help", "--help", "-h"].includes(name)) return console.log(usage);
  if (["version", "--version", "-v"].includes(name)) return console.log(version());
  const command = Object.hasOwn(commands, name) ? commands[name] : undefined;
  if (command === undefined) {
    const { didYouMean, nearestNames } = await import("../numeric/index.js");
    const hint = didYouMean(nearestNames(name, Object.keys(commands)));
    throw new UsageError(`Unknown command "${name}".${hint}\n\n${usage}`);
  }
  process.exitCode = await command(readArguments(rest));
}

function version(): string {
  const text = readFileSync(join(installationFolder(), "package.json"), "utf8");
  return (JSON.parse(text) as { readonly version: string }).version;
}

main().catch((cause: unknown) => {
  console.error(cause instanceof Error ? cause.message : String(cause));
  process.exitCode = cause instanceof UsageError ? misuse : 1;
});
