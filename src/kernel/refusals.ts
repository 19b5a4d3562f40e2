import { KernelError } from "./kernel-error.js";

export function unreadableConnectionFile(path: string, cause: unknown): KernelError {
  return new KernelError(
    "unreadable-connection-file",
    `The connection file "${path}" could not be read as JSON. A front end writes it and passes its path; ` +
      "start the kernel from a front end, or pass the path of a connection file that exists.",
    { path },
    cause,
  );
}

export function incompleteConnectionFile(path: string, field: string): KernelError {
  return new KernelError(
    "incomplete-connection-file",
    `The connection file "${path}" has no usable "${field}". Pass a connection file with transport, ip, key, ` +
      "signature_scheme and the five ports.",
    { path, field },
  );
}

export function unknownSignatureScheme(scheme: string): KernelError {
  return new KernelError(
    "unknown-signature-scheme",
    `The connection file asks for the signature scheme "${scheme}", which this Node cannot compute. ` +
      'Use "hmac-sha256".',
    { scheme },
  );
}

export function inputNotAllowed(): KernelError {
  return new KernelError(
    "input-not-allowed",
    "This front end does not accept questions to the reader, so input(...) cannot be answered. " +
      "Write the value into the cell instead.",
  );
}
