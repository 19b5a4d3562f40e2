import { join } from "node:path";
import { runKernel, warmUp } from "../kernel/index.js";
import type { Arguments } from "./arguments.js";

/** Runs a command and tells the exit status. What a command needs is loaded when it runs: the kernel starts fast. */
type Command = (given: Arguments) => Promise<number>;

const program = join(__dirname, "main.js");

export const usage: string = `periodwise kernel <connection file>      run as a kernel, for a front end
periodwise install [--prefix folder]     let Jupyter front ends find the kernel
periodwise remove [--prefix folder]      take that back
periodwise run <notebook...> [--set name=value] [--out folder]
                                         run notebooks without a front end; write the executed notebook and its page
periodwise start [notebook...]           the same, for every notebook of this checkout when none is named`;

export const commands: Readonly<Record<string, Command>> = {
  kernel: async ({ words: [connectionFile] }) => {
    if (connectionFile === undefined) throw missing("connection file", "periodwise kernel <connection file>");
    runKernel(connectionFile, async () => {
      const [{ ruleText }, { tradeTerms }] = await Promise.all([
        import("./rule-text.js"),
        import("./trade-terms.js"),
      ]);
      return [ruleText, tradeTerms];
    });
    return 0;
  },
  run: async ({ words, options, set }) => {
    if (words.length === 0) throw missing("notebook", "periodwise run <notebook...>");
    const { runAll } = await import("./run-all.js");
    return runAll(words, { kernel: [process.execPath, program, "kernel"], set, ...outOf(options) });
  },
  start: async ({ words, options, set }) => {
    const { runAll } = await import("./run-all.js");
    const { workedNotebooks } = await import("./worked-notebooks.js");
    const notebooks = words.length > 0 ? words : workedNotebooks();
    return runAll(notebooks, { kernel: [process.execPath, program, "kernel"], set, ...outOf(options) });
  },
  install: async ({ options }) => {
    const { dataFolder, installSpecification } = await import("../casework/index.js");
    const data = dataFolder(options["prefix"], process.env, process.platform);
    const folder = installSpecification(data, [process.execPath, program, "kernel"]);
    console.log(`Installed the kernel specification in ${folder}.`);
    warmUp(process.cwd());
    return 0;
  },
  remove: async ({ options }) => {
    const { dataFolder, removeSpecification } = await import("../casework/index.js");
    const folder = removeSpecification(dataFolder(options["prefix"], process.env, process.platform));
    console.log(folder ? `Removed ${folder}.` : "There is no specification of this kernel to remove.");
    return 0;
  },
};

function outOf(options: Arguments["options"]): { readonly out?: string } {
  return options["out"] === undefined ? {} : { out: options["out"] };
}

function missing(what: string, form: string): Error {
  return new Error(`Which ${what}? Write: ${form}`);
}
