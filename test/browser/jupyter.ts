import { type ChildProcess, spawn, spawnSync } from "node:child_process";
import { existsSync, mkdirSync } from "node:fs";
import { createServer } from "node:net";
import { join } from "node:path";

const server = "/usr/bin/jupyter-notebook";
const python = "/usr/bin/python3";

/** Front ends are looked at where Debian's are installed; in CI missing ones are a failure, not a skip. */
export const frontEndsThere: boolean = existsSync(server) || process.env["CI"] !== undefined;

/** Keeps what the front ends write inside a folder of the test. */
function surroundings(folder: string): NodeJS.ProcessEnv {
  const own = (name: string): string => {
    mkdirSync(join(folder, name), { recursive: true });
    return join(folder, name);
  };
  return {
    ...process.env,
    JUPYTER_CONFIG_DIR: own("config"),
    JUPYTER_DATA_DIR: own("data"),
    JUPYTER_RUNTIME_DIR: own("runtime"),
    IPYTHONDIR: own("ipython"),
  };
}

function runPython(folder: string, ...words: string[]): void {
  const done = spawnSync(python, ["-m", ...words], {
    cwd: folder,
    env: surroundings(folder),
    encoding: "utf8",
    timeout: 90_000,
  });
  if (done.status !== 0) throw new Error(`${words.join(" ")} failed: ${done.stderr}`);
}

/** Writes `name.html` beside `name.ipynb`. */
export function convert(folder: string, name: string): string {
  runPython(folder, "nbconvert", "--to", "html", `${name}.ipynb`);
  return join(folder, `${name}.html`);
}

/** Marks a notebook as one whose scripts may run. */
export function trust(folder: string, name: string): void {
  runPython(folder, "nbformat.sign", `${name}.ipynb`);
}

/** A notebook server on the loopback address, and how to end it. */
export interface NotebookServer {
  readonly url: (name: string) => string;
  readonly stop: () => void;
}

export async function startNotebookServer(folder: string): Promise<NotebookServer> {
  const port = await freePort();
  const address = [`--port=${port}`, "--ip=127.0.0.1", "--NotebookApp.token=", "--NotebookApp.password="];
  const child = spawn(server, ["--no-browser", "--allow-root", ...address], {
    cwd: folder,
    env: surroundings(folder),
    stdio: "ignore",
    detached: true,
  });
  await answering(`http://127.0.0.1:${port}/api`, child);
  return {
    url: (name) => `http://127.0.0.1:${port}/notebooks/${name}.ipynb`,
    // The server's kernels are in its process group.
    stop: () => {
      if (child.pid !== undefined && child.exitCode === null) process.kill(-child.pid, "SIGTERM");
    },
  };
}

async function answering(url: string, child: ChildProcess): Promise<void> {
  const until = Date.now() + 60_000;
  while (Date.now() < until && child.exitCode === null) {
    const answer = await fetch(url).catch(() => undefined);
    if (answer?.ok) return;
    await new Promise((done) => setTimeout(done, 200));
  }
  throw new Error(`No notebook server answers at ${url}.`);
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.on("error", reject);
    probe.listen(0, "127.0.0.1", () => {
      const address = probe.address();
      probe.close(() => resolve(typeof address === "object" && address !== null ? address.port : 0));
    });
  });
}
