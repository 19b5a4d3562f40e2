import { createHash } from "node:crypto";
import { createReadStream } from "node:fs";

/** What one pass over the bytes of a file tells. */
export interface FileScan {
  /** SHA-256, hexadecimal. */
  readonly checksum: string;
  readonly bytes: number;
}

/** Reads a file once, in pieces, for its checksum. */
export async function scanFile(path: string): Promise<FileScan> {
  const hash = createHash("sha256");
  let bytes = 0;
  for await (const piece of createReadStream(path, { highWaterMark: 1 << 20 }) as AsyncIterable<Buffer>) {
    hash.update(piece);
    bytes += piece.length;
  }
  return { checksum: hash.digest("hex"), bytes };
}
