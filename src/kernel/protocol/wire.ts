import type { Header, Message } from "./message.js";
import { replayGuard } from "./replay-guard.js";
import type { Signature } from "./signature.js";

const delimiter = Buffer.from("<IDS|MSG>");
const dictionaryCount = 4;

/** A message with its four dictionaries serialised, so that it can be passed to another thread cheaply. */
export interface Envelope {
  readonly identities: readonly Uint8Array[];
  readonly dictionaries: readonly string[];
  readonly buffers: readonly Uint8Array[];
}

export function envelope(message: Message): Envelope {
  const { identities, header, parent, metadata, content, buffers } = message;
  const dictionaries = [header, parent, metadata, content].map((dictionary) => JSON.stringify(dictionary));
  return { identities, dictionaries, buffers };
}

/** Frames: `[identities..., <IDS|MSG>, signature, header, parent, metadata, content, buffers...]`. */
export function framesOf(sealed: Envelope, signature: Signature): Uint8Array[] {
  const dictionaries = sealed.dictionaries.map((text) => Buffer.from(text));
  const signed = Buffer.from(signature.sign(dictionaries));
  return [...sealed.identities, delimiter, signed, ...dictionaries, ...sealed.buffers];
}

/** Reads frames; `undefined` for anything malformed, wrongly signed or replayed, which is dropped. */
export type Decoder = (frames: readonly Uint8Array[]) => Message | undefined;

export function decoder(signature: Signature): Decoder {
  const isNew = replayGuard();
  return (frames) => {
    const start = frames.findIndex((frame) => delimiter.equals(frame));
    const given = frames[start + 1];
    const dictionaries = frames.slice(start + 2, start + 2 + dictionaryCount);
    if (start < 0 || given === undefined || dictionaries.length < dictionaryCount) return undefined;
    if (!signature.matches(given, dictionaries)) return undefined;
    const read = readDictionaries(dictionaries);
    if (read === undefined || !isHeader(read[0])) return undefined;
    if (!isNew(Buffer.from(given).toString("latin1"))) return undefined;
    const [header, parent, metadata, content] = read;
    return {
      identities: frames.slice(0, start),
      header,
      // A parent is a header of ours or empty; only its id is read here.
      parent: parent as Message["parent"],
      metadata,
      content,
      buffers: frames.slice(start + 2 + dictionaryCount),
    };
  };
}

type Dictionary = Readonly<Record<string, unknown>>;
type FourDictionaries = [Dictionary, Dictionary, Dictionary, Dictionary];

function readDictionaries(frames: readonly Uint8Array[]): FourDictionaries | undefined {
  try {
    const read = frames.map((frame) => JSON.parse(Buffer.from(frame).toString("utf8")) as unknown);
    const plain = read.every((value) => typeof value === "object" && value !== null && !Array.isArray(value));
    // The caller checked that there are exactly four frames.
    return plain ? (read as FourDictionaries) : undefined;
  } catch {
    return undefined;
  }
}

function isHeader(value: Dictionary): value is Dictionary & Header {
  return typeof value["msg_type"] === "string" && typeof value["msg_id"] === "string";
}
