import type { DuckDBVector } from "@duckdb/node-api";

/** Bytes of a text that stand in its own cell of the engine's vector, behind its length; and words of a cell. */
const inlineBytes = 12;
const cellWords = 4;

/**
 * Adds the texts of one vector of the engine to a list; null where there is none.
 *
 * The reader of the engine's package decodes every text through a general decoder. Here a text equal to the one
 * before it is taken over, and a short plain one is cut from the vector's bytes; what is longer, or not plain
 * ASCII, or not laid out as expected, goes through that reader.
 */
export function addTexts(vector: DuckDBVector, rows: number, texts: (string | null)[]): void {
  // Not in the package's types: present in the pinned version, and done without where it is not.
  const { dataView, validity } = vector as unknown as {
    dataView?: DataView;
    validity?: { data?: BigUint64Array | null };
  };
  if (
    dataView === undefined ||
    dataView.byteOffset % 4 !== 0 ||
    validity === undefined ||
    !allPresent(validity.data, rows)
  )
    addOneByOne(vector, rows, texts);
  else addPlain(vector, dataView, rows, texts);
}

function addPlain(vector: DuckDBVector, view: DataView, rows: number, texts: (string | null)[]): void {
  const bytes = Buffer.from(view.buffer, view.byteOffset, view.byteLength);
  const words = new Int32Array(view.buffer, view.byteOffset, rows * cellWords);
  let before = -1;
  for (let row = 0; row < rows; row++) {
    const at = row * cellWords;
    if (before >= 0 && sameCell(words, at, before)) texts.push(texts[texts.length - 1]!);
    else {
      const length = words[at]!;
      const plain = length <= inlineBytes && isPlain(words, at);
      const start = at * 4 + 4;
      texts.push(plain ? bytes.toString("latin1", start, start + length) : (vector.getItem(row) as string));
      before = plain ? at : -1;
    }
  }
}

/** Whether every row has a value: no mask, or one with every bit of a row set. */
function allPresent(mask: BigUint64Array | null | undefined, rows: number): boolean {
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

/** No byte above 127: such bytes are the same text in every encoding met here. */
function isPlain(words: Int32Array, at: number): boolean {
  return ((words[at + 1]! | words[at + 2]! | words[at + 3]!) & 0x80808080) === 0;
}

function addOneByOne(vector: DuckDBVector, rows: number, texts: (string | null)[]): void {
  for (let row = 0; row < rows; row++) texts.push(vector.getItem(row) as string | null);
}
