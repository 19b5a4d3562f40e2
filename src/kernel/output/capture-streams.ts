import { presentRun } from "./run.js";

/** Sends what cells write to the standard streams, `console` included, to the cell that wrote it. */
export function captureStreams(): void {
  capture("stdout");
  capture("stderr");
}

function capture(name: "stdout" | "stderr"): void {
  const stream = process[name];
  const original = stream.write.bind(stream);
  const write = (chunk: string | Uint8Array, ...rest: unknown[]): boolean => {
    const run = presentRun();
    // Outside any cell the terminal that started the kernel is the place.
    if (run === undefined) return original(chunk);
    if (!run.silent)
      run.output.print(name, typeof chunk === "string" ? chunk : Buffer.from(chunk).toString());
    const done = rest.find((argument) => typeof argument === "function");
    if (typeof done === "function") process.nextTick(done as () => void);
    return true;
  };
  stream.write = write as typeof stream.write;
}
