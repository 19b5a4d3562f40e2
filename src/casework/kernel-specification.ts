import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { homedir } from "node:os";
import { join } from "node:path";
import { installationFolder } from "../kernel/index.js";
import type { KernelCommand } from "./client/kernel-process.js";
import { logoPng, logoSvg } from "./logo.js";
import { foreignSpecification } from "./refusals.js";

const kernelName = "periodwise";
/** What tells a folder of ours from anybody else's. */
const marker = "periodwise";

/**
 * Where kernel specifications of this user lie.
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

/** Writes the specification by which front ends find the kernel; returns its folder. */
export function installSpecification(data: string, command: KernelCommand): string {
  const folder = join(data, "kernels", kernelName);
  if (existsSync(folder) && !isOurs(folder)) throw foreignSpecification(folder);
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
  if (!isOurs(folder)) throw foreignSpecification(folder);
  rmSync(folder, { recursive: true });
  return folder;
}

function isOurs(folder: string): boolean {
  try {
    const found = JSON.parse(readFileSync(join(folder, "kernel.json"), "utf8")) as Specification;
    return found.metadata?.[marker] !== undefined;
  } catch {
    return false;
  }
}
