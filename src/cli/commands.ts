import { join } from "node:path";
import { runKernel, warmUp } from "../kernel/index.js";
import { type Arguments, UsageError } from "./arguments.js";

/** Runs a command and returns the exit status. Modules are loaded when a command needs them, so that the kernel starts fast. */
type Command = (given: Arguments) => Promise<number>;

const program = join(__dirname, "main.js");

export const usage: string = `Usage: periodwise <command>

  install [--prefix folder]   make the kernel available to Jupyter front ends
  remove [--prefix folder]    uninstall the kernel
  run <notebook...>           run notebooks without a front end; write each executed notebook and its page
  start [notebook...]         the same; without a notebook, all notebooks of this checkout
  kernel <connection file>    run as a kernel (called by front ends)

Options of run and start:
  --set name=value            give a top-level constant of the notebook another value
  --out folder                write to this folder; default: out, beside the notebook`;

export const commands: Readonly<Record<string, Command>> = {
  kernel: async ({ words: [connectionFile] }) => {
    if (connectionFile === undefined)
      throw missingArgumentError("connection file", "periodwise kernel <connection file>");
    runKernel(
      connectionFile,
      async () => {
        const [{ ruleTextLanguage }, { glossaryTerms }] = await Promise.all([
          import("./rule-text-language.js"),
          import("./glossary-terms.js"),
        ]);
        return [ruleTextLanguage, glossaryTerms];
      },
      async (name) => (await import("../../kernel-helpers/options/index.js")).helpText(name),
    );
    return 0;
  },
  run: async ({ words, options, set }) => {
    if (words.length === 0) throw missingArgumentError("notebook", "periodwise run <notebook...>");
    const { runAll } = await import("./run-all.js");
    return runAll(words, { kernel: [process.execPath, program, "kernel"], set, ...outputFolder(options) });
  },
  start: async ({ words, options, set }) => {
    const { runAll } = await import("./run-all.js");
    const { workedNotebooks } = await import("./worked-notebooks.js");
    const notebooks = words.length > 0 ? words : workedNotebooks();
    return runAll(notebooks, {
      kernel: [process.execPath, program, "kernel"],
      set,
      ...outputFolder(options),
    });
  },
  install: async ({ options }) => {
    const { dataFolder, installSpecification } = await import("../casework/index.js");
    const data = dataFolder(options["prefix"], process.env, process.platform);
    const folder = installSpecification(data, [process.execPath, program, "kernel"]);
    console.log(`Installed the kernel in ${folder}.`);
    warmUp(process.cwd());
    return 0;
  },
  remove: async ({ options }) => {
    const { dataFolder, removeSpecification } = await import("../casework/index.js");
    const folder = removeSpecification(dataFolder(options["prefix"], process.env, process.platform));
    console.log(folder ? `Removed ${folder}.` : "The kernel is not installed; nothing to remove.");
    return 0;
  },
};

function outputFolder(options: Arguments["options"]): { readonly out?: string } {
  return options["out"] === undefined ? {} : { out: options["out"] };
}

function missingArgumentError(what: string, form: string): UsageError {
  return new UsageError(`Give a ${what}: ${form}`);
}
