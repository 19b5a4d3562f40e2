import { isUtf8 } from "node:buffer";
import { createHash } from "node:crypto";
import { createReadStream } from "node:fs";

/** What one pass over the bytes of a file tells. */
export interface FileScan {
  /** SHA-256, hexadecimal. */
  readonly checksum: string;
  readonly bytes: number;
  /** False when any part of the file is not UTF-8 text. */
  readonly isUtf8: boolean;
}

/** Reads a file once, in pieces, for its checksum and whether it is UTF-8 text. */
export async function scanFile(path: string): Promise<FileScan> {
  const hash = createHash("sha256");
  let bytes = 0;
  let utf8 = true;
  let carried: Buffer = Buffer.alloc(0);
  for await (const piece of createReadStream(path, { highWaterMark: 1 << 20 }) as AsyncIterable<Buffer>) {
    hash.update(piece);
    bytes += piece.length;
    const text = carried.length === 0 ? piece : Buffer.concat([carried, piece]);
    const end = lastWholeLetter(text);
    utf8 &&= isUtf8(text.subarray(0, end));
    carried = Buffer.from(text.subarray(end));
  }
  return { checksum: hash.digest("hex"), bytes, isUtf8: utf8 && carried.length === 0 };
}

/** Where a letter of several bytes that the end cuts off begins; the whole length when none is cut off. */
function lastWholeLetter(text: Buffer): number {
  let back = 1;
  while (back < Math.min(4, text.length) && isFollowing(text[text.length - back]!)) back++;
  const lead = text[text.length - back] ?? 0;
  return lettersBytes(lead) > back ? text.length - back : text.length;
}

function isFollowing(byte: number): boolean {
  return byte >= 0x80 && byte < 0xc0;
}

/** Bytes of the letter that a byte leads, in UTF-8. */
function lettersBytes(lead: number): number {
  if (lead >= 0xf0) return 4;
  if (lead >= 0xe0) return 3;
  return lead >= 0xc0 ? 2 : 1;
}
