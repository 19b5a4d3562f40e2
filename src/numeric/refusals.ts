import { ModelError } from "./model-error.js";

export function noSignChange(from: number, to: number, atFrom: number, atTo: number): ModelError {
  return new ModelError(
    "no-sign-change",
    `The function is ${atFrom} at ${from} and ${atTo} at ${to}, so no root is enclosed between them. Give two places where its signs differ.`,
    { from, to, atFrom, atTo },
  );
}

export function emptySample(): ModelError {
  return new ModelError(
    "empty-sample",
    "A quantile was asked of a sample without values. Give at least one value.",
  );
}

export function badSeed(seed: unknown): ModelError {
  return new ModelError(
    "bad-seed",
    `The seed ${String(seed)} is not a whole number from 0 to ${Number.MAX_SAFE_INTEGER}. Give such a number, for example the date of the case as 20260401.`,
    { seed },
  );
}
