import { open } from "node:fs/promises";

/** Bytes of a text file that are inspected before it is read. */
export const headBytes: number = 1 << 18;

/** The beginning of a text file, cut at the end of a line; undefined if it is not UTF-8 text. */
export async function textHead(path: string): Promise<string | undefined> {
  const file = await open(path);
  try {
    const { bytesRead, buffer } = await file.read(Buffer.alloc(headBytes), 0, headBytes, 0);
    const bytes = buffer.subarray(0, bytesRead);
    const end = bytesRead < headBytes ? bytesRead : bytes.lastIndexOf(10) + 1;
    const text = bytes.toString("utf8", 0, end);
    return end > 0 && !text.includes("\ufffd") && !text.includes("\0") ? text : undefined;
  } finally {
    await file.close();
  }
}
