import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { homedir } from "node:os";
import { join } from "node:path";
import { installationFolder } from "../kernel/index.js";
import type { KernelCommand } from "./client/kernel-process.js";
import { foreignSpecificationError } from "./errors.js";
import { logoPng, logoSvg } from "./logo.js";

const kernelName = "periodwise";
/** Identifies a specification written by this program. */
const marker = "periodwise";

/**
 * Folder of the user's kernel specifications.
 * @see Jupyter documentation, "Common directories and file locations": data directory.
 */
export function dataFolder(prefix: string | undefined, env: NodeJS.ProcessEnv, platform: string): string {
  if (prefix !== undefined) return join(prefix, "share", "jupyter");
  if (env["JUPYTER_DATA_DIR"]) return env["JUPYTER_DATA_DIR"];
  const home = homedir();
  if (platform === "darwin") return join(home, "Library", "Jupyter");
  if (platform === "win32") return join(env["APPDATA"] ?? join(home, "AppData", "Roaming"), "jupyter");
  return join(env["XDG_DATA_HOME"] || join(home, ".local", "share"), "jupyter");
}

/** The sizes that front ends look for. */
const logoSizes = [32, 64];

interface Specification {
  readonly metadata?: Readonly<Record<string, unknown>>;
}

/** Writes the kernel specification for front ends; returns its folder. */
export function installSpecification(data: string, command: KernelCommand): string {
  const folder = join(data, "kernels", kernelName);
  if (existsSync(folder) && !isOwnSpecification(folder)) throw foreignSpecificationError(folder);
  mkdirSync(folder, { recursive: true });
  const { version } = JSON.parse(readFileSync(join(installationFolder(), "package.json"), "utf8")) as {
    readonly version: string;
  };
  const specification = {
    argv: [...command, "{connection_file}"],
    display_name: "Periodwise (TypeScript)",
    language: "typescript",
    interrupt_mode: "message",
    metadata: { [marker]: { version, node: process.version } },
  };
  writeFileSync(join(folder, "kernel.json"), `${JSON.stringify(specification, undefined, 2)}\n`);
  writeFileSync(join(folder, "logo-svg.svg"), logoSvg);
  for (const size of logoSizes) writeFileSync(join(folder, `logo-${size}x${size}.png`), logoPng(size));
  return folder;
}

/** Removes the specification; `undefined` when there is none. @throws {KernelError} `foreign-specification`. */
export function removeSpecification(data: string): string | undefined {
  const folder = join(data, "kernels", kernelName);
  if (!existsSync(folder)) return undefined;
  if (!isOwnSpecification(folder)) throw foreignSpecificationError(folder);
  rmSync(folder, { recursive: true });
  return folder;
}

function isOwnSpecification(folder: string): boolean {
  try {
    const found = JSON.parse(readFileSync(join(folder, "kernel.json"), "utf8")) as Specification;
    return found.metadata?.[marker] !== undefined;
  } catch {
    return false;
  }
}
