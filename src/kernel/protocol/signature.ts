import { createHmac, timingSafeEqual } from "node:crypto";
import { unknownSignatureSchemeError } from "../errors.js";

/**
 * Signs the four dictionaries of a message and verifies signatures.
 * @see Jupyter messaging, "The wire protocol": HMAC over the raw bytes; an empty key means no signature.
 */
export interface Signature {
  readonly sign: (dictionaries: readonly Uint8Array[]) => string;
  readonly matches: (signature: Uint8Array, dictionaries: readonly Uint8Array[]) => boolean;
}

/** @throws {KernelError} `unknown-signature-scheme`. */
export function signatureOf(key: string, scheme: string): Signature {
  if (key === "") return { sign: () => "", matches: () => true };
  const digest = scheme.replace(/^hmac-/, "");
  const sign = (dictionaries: readonly Uint8Array[]): string => {
    const mac = createHmac(digest, key);
    for (const bytes of dictionaries) mac.update(bytes);
    return mac.digest("hex");
  };
  try {
    sign([]);
  } catch {
    throw unknownSignatureSchemeError(scheme);
  }
  return {
    sign,
    matches: (signature, dictionaries) => {
      const wanted = Buffer.from(sign(dictionaries));
      return wanted.length === signature.length && timingSafeEqual(wanted, signature);
    },
  };
}
