import { existsSync } from "node:fs";
import { createRequire } from "node:module";
import { relative } from "node:path";
import type { Converter, ConvertResult } from "tslab/dist/converter";
import { installBundledModules, type Preloaded } from "./bundled-modules.js";
import { type CellCompiler, type CompiledCell, type CompiledModule, cellCompiler } from "./cell-compiler.js";
import { Interrupted } from "./cell-error.js";
import { changedModules } from "./changed-modules.js";
import { bundledPackages } from "./installation.js";
import { modulePreloader } from "./preload-modules.js";
import { redeclaredNames } from "./redeclared-names.js";
import type { Source, SourceRegistry } from "./source-registry.js";

const load = createRequire(__filename);

/** The outcome of a cell. `value` is the value of its last expression; null and undefined are not shown. */
export type CellOutcome =
  | { readonly kind: "value"; readonly value: unknown }
  | { readonly kind: "nothing" }
  | { readonly kind: "failed"; readonly cause: unknown };

/** The cells of one notebook: later cells see what earlier ones declared. */
export interface CellSession {
  readonly compiler: CellCompiler;
  /** Declarations of everything that cells have declared so far. */
  readonly declarations: () => string;
  /** `isStopped` is checked before the cell starts: it may have been interrupted during compilation. */
  readonly run: (
    text: string,
    name: string,
    label: string,
    isStopped?: () => boolean,
  ) => Promise<CellOutcome>;
  /** Ends the await of the running cell. */
  readonly stop: () => void;
}

/** Global functions that the wrapped code of a cell calls. */
export const trackName = "__periodwiseTrack";
export const runBetweenAwaitsName = "__periodwiseRunBetweenAwaits";

export function cellSession(folder: string, sources: SourceRegistry): CellSession {
  const packages = bundledPackages();
  const preloaded: Preloaded = new Map();
  installBundledModules(folder, packages, preloaded);
  const preload = modulePreloader(folder, preloaded);
  const compiler = cellCompiler(folder, packages);
  const changed = changedModules();
  const { createExecutor } = load("tslab/dist/executor") as typeof import("tslab/dist/executor");

  let declarations = "";
  let prepared: ConvertResult = { diagnostics: [] };
  let outcome: CellOutcome = { kind: "nothing" };
  // The executor takes the cell from its converter and reports the outcome on a console.
  const preparedConverter = { convert: () => prepared } as unknown as Converter;
  const resultConsole = {
    log: (value: unknown) => {
      outcome = { kind: "value", value };
    },
    error: (cause: unknown) => {
      outcome = { kind: "failed", cause };
    },
  };
  const executor = createExecutor(
    folder,
    { node: preparedConverter, browser: preparedConverter, close: () => undefined },
    resultConsole,
  );

  return {
    compiler,
    declarations: () => declarations,
    stop: () => executor.interrupt(),
    run: async (text, name, label, isStopped = () => false) => {
      outcome = { kind: "nothing" };
      try {
        const cell = compiler.compile(declarations, text);
        sources.add({ name, label, text, mapPosition: cell.mapPosition });
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
      return outcome.kind === "failed" ? { kind: "failed", cause: interruptedOr(outcome.cause) } : outcome;
    },
  };
}

function moduleSource(folder: string, { path, mapPosition }: CompiledModule): Source {
  const written =
    [".ts", ".tsx"].map((end) => path.replace(/\.js$/, end)).find((one) => existsSync(one)) ?? path;
  return { name: path, label: relative(folder, written), file: written, mapPosition: mapPosition };
}

/** The cell in the form of the executor, with its name for stack traces. */
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

/** Source maps count the lines of the code alone, so the wrapper stays on lines of its own. */
function bodyOf({ code, usesAwait, yields }: CompiledCell): string {
  if (!usesAwait) return `\n${code}`;
  if (yields) return `await ${trackName}(${runBetweenAwaitsName}(function* () {\n${code}\n}))`;
  return `await ${trackName}((async () => {\n${code}\n})())`;
}

/** After a failed cell, names that it redeclared get their former values back. */
function restore(locals: Record<string, unknown>, before: Record<string, unknown>, cell: CompiledCell): void {
  for (const name of redeclaredNames(cell.code)) {
    if (Object.hasOwn(before, name)) locals[name] = before[name];
  }
  if (cell.lastValue !== undefined) delete locals[cell.lastValue];
}

function interruptedOr(cause: unknown): unknown {
  if (!(cause instanceof Error)) return cause;
  const code = (cause as NodeJS.ErrnoException).code;
  const stopped =
    code === "ERR_SCRIPT_EXECUTION_INTERRUPTED" || cause.message === "Interrupted asynchronously";
  return stopped ? new Interrupted() : cause;
}
