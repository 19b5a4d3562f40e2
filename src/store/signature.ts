import { open } from "node:fs/promises";
import type { Format } from "./read-options.js";

const signatures: readonly { readonly format: Format; readonly at: number; readonly bytes: string }[] = [
  { format: "parquet", at: 0, bytes: "PAR1" },
  { format: "excel", at: 0, bytes: "PK\x03\x04" },
  { format: "excel", at: 0, bytes: "\xd0\xcf\x11\xe0" },
  { format: "duckdb", at: 8, bytes: "DUCK" },
];

/** Format by the first bytes of a file, whatever its extension; undefined for text. */
export async function formatOfSignature(path: string): Promise<Format | undefined> {
  const file = await open(path);
  try {
    const { buffer, bytesRead } = await file.read(Buffer.alloc(16), 0, 16, 0);
    const head = buffer.toString("latin1", 0, bytesRead);
    return signatures.find(({ at, bytes }) => head.startsWith(bytes, at))?.format;
  } finally {
    await file.close();
  }
}
