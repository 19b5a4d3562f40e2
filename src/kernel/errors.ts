import { KernelError } from "./kernel-error.js";

export function unreadableConnectionFileError(path: string, cause: unknown): KernelError {
  return new KernelError(
    "unreadable-connection-file",
    `Cannot read the connection file "${path}" as JSON. A front end writes this file and passes its path: ` +
      "start the kernel from a front end, or give the path of an existing connection file.",
    { path },
    cause,
  );
}

export function incompleteConnectionFileError(path: string, field: string): KernelError {
  return new KernelError(
    "incomplete-connection-file",
    `The connection file "${path}" has no valid "${field}". It needs transport, ip, key, signature_scheme ` +
      "and the five ports.",
    { path, field },
  );
}

export function unknownSignatureSchemeError(scheme: string): KernelError {
  return new KernelError(
    "unknown-signature-scheme",
    `The connection file has the signature scheme "${scheme}", which Node does not support. ` +
      'Use "hmac-sha256".',
    { scheme },
  );
}

export function inputNotAllowedError(): KernelError {
  return new KernelError(
    "input-not-allowed",
    "This front end does not support input(...). Write the value into the cell instead.",
  );
}
