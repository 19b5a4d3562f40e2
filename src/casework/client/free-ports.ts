import { createServer, type Server } from "node:net";

/** Ports of the loopback interface that were free a moment ago, all different. */
export async function freePorts(count: number): Promise<readonly number[]> {
  const servers = await Promise.all(Array.from({ length: count }, listening));
  const ports = servers.map((server) => {
    const address = server.address();
    // A server that listens on a port has an address with one.
    return typeof address === "object" && address !== null ? address.port : 0;
  });
  await Promise.all(servers.map((server) => new Promise((closed) => server.close(closed))));
  return ports;
}

function listening(): Promise<Server> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once("error", reject);
    server.listen(0, "127.0.0.1", () => resolve(server));
  });
}
