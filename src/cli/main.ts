#!/usr/bin/env node
import { readArguments } from "./arguments.js";
import { commands, usage } from "./commands.js";

/** Reads the command line, runs the command, and says in words what went wrong when something did. */
async function main(): Promise<void> {
  const [name = "help", ...rest] = process.argv.slice(2);
  const command = Object.hasOwn(commands, name) ? commands[name] : undefined;
  if (command === undefined) {
    const known = name === "help" || name === "--help";
    (known ? console.log : console.error)(known ? usage : `There is no command "${name}".\n\n${usage}`);
    process.exitCode = known ? 0 : 2;
    return;
  }
  process.exitCode = await command(readArguments(rest));
}

main().catch((cause: unknown) => {
  console.error(cause instanceof Error ? cause.message : String(cause));
  process.exitCode = 1;
});
