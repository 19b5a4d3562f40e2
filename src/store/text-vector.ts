import type { DuckDBVector } from "@duckdb/node-api";

/** Bytes of a short string stored inline in the engine's vector, after its length; and 32-bit words per cell. */
const inlineBytes = 12;
const cellWords = 4;

/**
 * Appends the strings of one vector of the engine to a list; null where missing.
 *
 * The package of the engine sends every string through a general decoder. Here a string equal to the previous one is
 * reused, and a short ASCII string is sliced from the bytes of the vector; longer strings, other letters and an
 * unexpected layout go through the package.
 */
export function appendTexts(vector: DuckDBVector, rows: number, texts: (string | null)[]): void {
  // Not in the types of the package: present in the pinned version, with a fallback where it is not.
  const { dataView, validity } = vector as unknown as {
    dataView?: DataView;
    validity?: { data?: BigUint64Array | null };
  };
  if (
    dataView === undefined ||
    dataView.byteOffset % 4 !== 0 ||
    validity === undefined ||
    !noneMissing(validity.data, rows)
  )
    appendOneByOne(vector, rows, texts);
  else appendAscii(vector, dataView, rows, texts);
}

function appendAscii(vector: DuckDBVector, view: DataView, rows: number, texts: (string | null)[]): void {
  const bytes = Buffer.from(view.buffer, view.byteOffset, view.byteLength);
  const words = new Int32Array(view.buffer, view.byteOffset, rows * cellWords);
  let before = -1;
  for (let row = 0; row < rows; row++) {
    const at = row * cellWords;
    if (before >= 0 && sameCell(words, at, before)) texts.push(texts[texts.length - 1]!);
    else {
      const length = words[at]!;
      const plain = length <= inlineBytes && isAscii(words, at);
      const start = at * 4 + 4;
      texts.push(plain ? bytes.toString("latin1", start, start + length) : (vector.getItem(row) as string));
      before = plain ? at : -1;
    }
  }
}

/** Whether every row has a value: no validity mask, or one with every bit set. */
function noneMissing(mask: BigUint64Array | null | undefined, rows: number): boolean {
  if (!mask) return true;
  const whole = Math.floor(rows / 64);
  const rest = (1n << BigInt(rows % 64)) - 1n;
  const full = 0xffffffffffffffffn;
  return (
    mask.subarray(0, whole).every((word) => word === full) && (rest === 0n || (mask[whole]! & rest) === rest)
  );
}

function sameCell(words: Int32Array, a: number, b: number): boolean {
  return (
    words[a] === words[b] &&
    words[a + 1] === words[b + 1] &&
    words[a + 2] === words[b + 2] &&
    words[a + 3] === words[b + 3]
  );
}

/** No byte above 127. */
function isAscii(words: Int32Array, at: number): boolean {
  return ((words[at + 1]! | words[at + 2]! | words[at + 3]!) & 0x80808080) === 0;
}

function appendOneByOne(vector: DuckDBVector, rows: number, texts: (string | null)[]): void {
  for (let row = 0; row < rows; row++) texts.push(vector.getItem(row) as string | null);
}
