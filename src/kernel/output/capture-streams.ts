import { currentRun } from "./run.js";

/** Redirects what cells write to the standard streams, including `console`, to the output of the cell. */
export function captureStreams(): void {
  capture("stdout");
  capture("stderr");
}

function capture(name: "stdout" | "stderr"): void {
  const stream = process[name];
  const original = stream.write.bind(stream);
  const write = (chunk: string | Uint8Array, ...rest: unknown[]): boolean => {
    const run = currentRun();
    // Outside any cell, write to the terminal that started the kernel.
    if (run === undefined) return original(chunk);
    if (!run.silent)
      run.output.print(name, typeof chunk === "string" ? chunk : Buffer.from(chunk).toString());
    const done = rest.find((argument) => typeof argument === "function");
    if (typeof done === "function") process.nextTick(done as () => void);
    return true;
  };
  stream.write = write as typeof stream.write;
}
