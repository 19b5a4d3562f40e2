import { isUtf8 } from "node:buffer";
import { unclearEncodingError, unknownEncodingError } from "./errors.js";

/**
 * Decodes the bytes of a file: UTF-8, UTF-16 with a byte-order mark, or the encoding given.
 *
 * @throws {ModelError} `encoding-unclear`, naming the first line that is not UTF-8; `encoding-unknown`.
 */
export function decodeText(bytes: Buffer, path: string, encoding: string | undefined): string {
  if (encoding !== undefined) return decode(bytes, encoding, path);
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return decode(bytes, "utf-16le", path);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return decode(bytes, "utf-16be", path);
  if (isUtf8(bytes)) return withoutByteOrderMark(bytes.toString("utf8"));
  throw firstLineNotUtf8(bytes, path);
}

function decode(bytes: Buffer, encoding: string, path: string): string {
  try {
    return withoutByteOrderMark(new TextDecoder(encoding, { fatal: true }).decode(bytes));
  } catch (cause) {
    throw unknownEncodingError(path, encoding, cause);
  }
}

function withoutByteOrderMark(text: string): string {
  return text.startsWith("\ufeff") ? text.slice(1) : text;
}

function firstLineNotUtf8(bytes: Buffer, path: string): Error {
  let from = 0;
  for (let line = 1; ; line++) {
    const found = bytes.indexOf(10, from);
    const end = found < 0 ? bytes.length : found;
    const piece = bytes.subarray(from, end);
    if (!isUtf8(piece) || found < 0) return unclearEncodingError(path, line, piece.toString("latin1"));
    from = end + 1;
  }
}
