import { isUtf8 } from "node:buffer";
import { encodingUnclear, encodingUnknown } from "./refusals.js";

/**
 * The text of a file's bytes: UTF-8, or UTF-16 where a byte-order mark says so, or the encoding asked for.
 *
 * @throws {ModelError} `encoding-unclear`, naming the first line that is not UTF-8; `encoding-unknown`.
 */
export function decodedText(bytes: Buffer, path: string, encoding: string | undefined): string {
  if (encoding !== undefined) return decode(bytes, encoding, path);
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return decode(bytes, "utf-16le", path);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return decode(bytes, "utf-16be", path);
  if (isUtf8(bytes)) return withoutMark(bytes.toString("utf8"));
  throw firstBadLine(bytes, path);
}

function decode(bytes: Buffer, encoding: string, path: string): string {
  try {
    return withoutMark(new TextDecoder(encoding, { fatal: true }).decode(bytes));
  } catch (cause) {
    throw encodingUnknown(path, encoding, cause);
  }
}

function withoutMark(text: string): string {
  return text.startsWith("\ufeff") ? text.slice(1) : text;
}

function firstBadLine(bytes: Buffer, path: string): Error {
  let from = 0;
  for (let line = 1; ; line++) {
    const found = bytes.indexOf(10, from);
    const end = found < 0 ? bytes.length : found;
    const piece = bytes.subarray(from, end);
    if (!isUtf8(piece) || found < 0) return encodingUnclear(path, line, piece.toString("latin1"));
    from = end + 1;
  }
}
