import { join } from "node:path";
import { Worker } from "node:worker_threads";
import type { FromTransport, ToTransport, TransportData } from "./port-messages.js";

/** The kernel's side of the transport thread. */
export interface Transport {
  readonly post: (message: ToTransport) => void;
  readonly receive: (listener: (message: FromTransport) => void) => void;
}

export function startTransport(data: TransportData): Transport {
  const worker = new Worker(join(__dirname, "transport-worker.js"), { workerData: data });
  // A kernel without sockets is useless, so the process ends with the reason.
  worker.on("error", (cause) => {
    process.stderr.write(`The kernel cannot listen on its ports: ${cause.message}\n`);
    process.exit(1);
  });
  return {
    post: (message) => worker.postMessage(message),
    receive: (listener) => void worker.on("message", listener),
  };
}
