import { existsSync } from "node:fs";
import { createRequire } from "node:module";
import { relative } from "node:path";
import type { Converter, ConvertResult } from "tslab/dist/converter";
import { type CellCompiler, type CompiledCell, type CompiledModule, cellCompiler } from "./cell-compiler.js";
import { Interrupted } from "./cell-error.js";
import { changedModules } from "./changed-modules.js";
import { ownPackages } from "./installation.js";
import { installOwnModules, type Preloaded } from "./own-modules.js";
import { modulePreloader } from "./preload-modules.js";
import { redeclaredNames } from "./redeclared-names.js";
import type { Source, SourceRegister } from "./source-register.js";

const load = createRequire(__filename);

/** What became of a cell. `value` is that of its last expression; null and undefined are shown as nothing. */
export type CellOutcome =
  | { readonly kind: "value"; readonly value: unknown }
  | { readonly kind: "nothing" }
  | { readonly kind: "failed"; readonly cause: unknown };

/** The cells of one notebook: what earlier ones declared is there for later ones. */
export interface CellSession {
  readonly compiler: CellCompiler;
  /** Declarations of everything that cells so far have made. */
  readonly declarations: () => string;
  /** `isStopped` is asked before the cell begins: it may have been interrupted while it was compiled. */
  readonly run: (
    text: string,
    name: string,
    label: string,
    isStopped?: () => boolean,
  ) => Promise<CellOutcome>;
  /** Ends the wait of the running cell. */
  readonly stop: () => void;
}

/** Names of what the wrapped code of a cell calls; put on the global object by the kernel. */
export const followName = "__periodwiseFollow";
export const stretchesName = "__periodwiseStretches";

export function cellSession(folder: string, sources: SourceRegister): CellSession {
  const packages = ownPackages();
  const preloaded: Preloaded = new Map();
  installOwnModules(folder, packages, preloaded);
  const preload = modulePreloader(folder, preloaded);
  const compiler = cellCompiler(folder, packages);
  const changed = changedModules();
  const { createExecutor } = load("tslab/dist/executor") as typeof import("tslab/dist/executor");

  let declarations = "";
  let prepared: ConvertResult = { diagnostics: [] };
  let outcome: CellOutcome = { kind: "nothing" };
  // The executor asks its converter for the cell, and says on a console what came of it.
  const given = { convert: () => prepared } as unknown as Converter;
  const told = {
    log: (value: unknown) => {
      outcome = { kind: "value", value };
    },
    error: (cause: unknown) => {
      outcome = { kind: "failed", cause };
    },
  };
  const executor = createExecutor(folder, { node: given, browser: given, close: () => undefined }, told);

  return {
    compiler,
    declarations: () => declarations,
    stop: () => executor.interrupt(),
    run: async (text, name, label, isStopped = () => false) => {
      outcome = { kind: "nothing" };
      try {
        const cell = compiler.compile(declarations, text);
        sources.add({ name, label, text, findPlace: cell.findPlace });
        for (const module of cell.modules) sources.add(moduleSource(folder, module));
        const modules = changed.withDependents(cell.modules);
        await preload([cell.code, ...cell.modules.map(({ code }) => code)]);
        prepared = executable(cell, modules, name);
        if (isStopped()) throw new Interrupted();
        const before = { ...executor.locals };
        if (await executor.execute("")) declarations = cell.declarations;
        else restore(executor.locals, before, cell);
      } catch (cause) {
        outcome = { kind: "failed", cause };
      }
      return outcome.kind === "failed" ? { kind: "failed", cause: stopCause(outcome.cause) } : outcome;
    },
  };
}

function moduleSource(folder: string, { path, findPlace }: CompiledModule): Source {
  const written =
    [".ts", ".tsx"].map((end) => path.replace(/\.js$/, end)).find((one) => existsSync(one)) ?? path;
  return { name: path, label: relative(folder, written), file: written, findPlace };
}

/** The cell as the executor takes it, with its name for stack traces. */
function executable(cell: CompiledCell, modules: readonly CompiledModule[], name: string): ConvertResult {
  return {
    output: `${bodyOf(cell)}\n//# sourceURL=${name}`,
    declOutput: cell.declarations,
    diagnostics: [],
    hasToplevelAwait: cell.usesAwait,
    sideOutputs: modules.map((module) => ({ path: module.path, data: module.code })),
    ...(cell.lastValue === undefined ? {} : { lastExpressionVar: cell.lastValue }),
  };
}

/** A map counts the lines of the code alone, so what goes around it stays on a line of its own. */
function bodyOf({ code, usesAwait, yields }: CompiledCell): string {
  if (!usesAwait) return `\n${code}`;
  if (yields) return `await ${followName}(${stretchesName}(function* () {\n${code}\n}))`;
  return `await ${followName}((async () => {\n${code}\n})())`;
}

/** A failed cell leaves earlier values: names it declared again get their former value back. */
function restore(locals: Record<string, unknown>, before: Record<string, unknown>, cell: CompiledCell): void {
  for (const name of redeclaredNames(cell.code)) {
    if (Object.hasOwn(before, name)) locals[name] = before[name];
  }
  if (cell.lastValue !== undefined) delete locals[cell.lastValue];
}

function stopCause(cause: unknown): unknown {
  if (!(cause instanceof Error)) return cause;
  const code = (cause as NodeJS.ErrnoException).code;
  const stopped =
    code === "ERR_SCRIPT_EXECUTION_INTERRUPTED" || cause.message === "Interrupted asynchronously";
  return stopped ? new Interrupted() : cause;
}
