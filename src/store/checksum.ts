import { createReadStream } from "node:fs";

/** Checksum and size of a file. */
export interface FileChecksum {
  /** SHA-256, hexadecimal. */
  readonly checksum: string;
  readonly bytes: number;
}

/** Computes the checksum of a file in one pass. */
export async function fileChecksum(path: string): Promise<FileChecksum> {
  // Loaded with the first file, not with the package.
  const { createHash } = await import("node:crypto");
  const hash = createHash("sha256");
  let bytes = 0;
  for await (const piece of createReadStream(path, { highWaterMark: 1 << 20 }) as AsyncIterable<Buffer>) {
    hash.update(piece);
    bytes += piece.length;
  }
  return { checksum: hash.digest("hex"), bytes };
}
