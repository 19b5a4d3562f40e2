import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { existsSync, mkdirSync } from "node:fs";
import { createServer } from "node:net";
import { join } from "node:path";
import { installSpecification } from "../../src/casework/index.js";

const program = "/usr/bin/jupyter-notebook";
const root = join(import.meta.dirname, "..", "..");

/** In CI a missing notebook server is a failure, elsewhere a visible skip. */
export const notebookServerThere: boolean = existsSync(program) || process.env["CI"] !== undefined;

/** Debian's classic notebook, serving a folder to this machine only. */
export interface NotebookServer {
  readonly url: string;
  readonly stop: () => Promise<void>;
}

async function freePort(): Promise<number> {
  const server = createServer().listen(0, "127.0.0.1");
  await once(server, "listening");
  const address = server.address();
  const port = typeof address === "object" && address !== null ? address.port : 0;
  server.close();
  return port;
}

export async function startNotebookServer(folder: string): Promise<NotebookServer> {
  const data = join(folder, "data-folder");
  mkdirSync(join(folder, "home"), { recursive: true });
  installSpecification(data, [process.execPath, join(root, "dist/src/cli/main.js"), "kernel"]);
  const port = await freePort();
  const words = [
    "--no-browser",
    "--allow-root",
    "--ip=127.0.0.1",
    `--port=${port}`,
    `--notebook-dir=${folder}`,
  ];
  const open = ["--NotebookApp.token=", "--NotebookApp.password=", "--NotebookApp.port_retries=0"];
  const env = {
    ...process.env,
    JUPYTER_PATH: data,
    HOME: join(folder, "home"),
    XDG_CACHE_HOME: join(folder, "cache"),
  };
  const server: ChildProcess = spawn(program, [...words, ...open], { cwd: folder, env, stdio: "ignore" });
  const url = `http://127.0.0.1:${port}`;
  for (let left = 300; left > 0; left--) {
    if (await answers(`${url}/api`)) break;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  return {
    url,
    stop: async () => {
      const exited = once(server, "exit");
      server.kill("SIGTERM");
      const impatient = setTimeout(() => server.kill("SIGKILL"), 10_000);
      await exited;
      clearTimeout(impatient);
    },
  };
}

async function answers(url: string): Promise<boolean> {
  try {
    return (await fetch(url)).ok;
  } catch {
    return false;
  }
}
