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

export function interrupted(done: number, of: number, reason: unknown): ModelError {
  return new ModelError(
    "interrupted",
    `The signal ended the run after ${done} of ${of}; its result is not kept. Run it again without aborting for one.`,
    { done, of },
    reason,
  );
}

export function badSeed(seed: unknown): ModelError {
  return new ModelError(
    "bad-seed",
    `The seed ${String(seed)} is not a whole number from 0 to ${Number.MAX_SAFE_INTEGER}. Give such a number, for example the date of the case as 20260401.`,
    { seed },
  );
}

export function residualsOfOtherLength(expected: number, found: number): ModelError {
  return new ModelError(
    "residuals-of-other-length",
    `The residual function gave ${found} values after giving ${expected} at the start. Give one residual for every observation, at whatever parameters; where the model is not defined, give NaN.`,
    { expected, found },
  );
}

export function jacobianOfOtherShape(rows: number, size: number, found: number): ModelError {
  return new ModelError(
    "jacobian-of-other-shape",
    `The Jacobian has ${found} entries, but ${rows} residuals by ${size} parameters need ${rows * size}. Give it row after row: the derivatives of the first residual by every parameter come first.`,
    { rows, size, found },
  );
}

export function tooFewResiduals(rows: number, size: number): ModelError {
  return new ModelError(
    "too-few-residuals",
    `${rows} residuals cannot determine ${size} parameters. Give at least as many residuals as parameters, or hold some parameters fixed.`,
    { rows, size },
  );
}

export function badStart(position: number, value: number): ModelError {
  return new ModelError(
    "bad-start",
    `Start value ${position + 1} is ${value}. Give a finite number to start every parameter from.`,
    { position, value },
  );
}

export function badBounds(position: number, lower: number, upper: number): ModelError {
  return new ModelError(
    "bad-bounds",
    `Parameter ${position + 1} has the lower bound ${lower} and the upper bound ${upper}. Give a lower bound that is not above the upper one.`,
    { position, lower, upper },
  );
}

export function otherNumberOf(what: string, expected: number, found: number): ModelError {
  return new ModelError(
    "other-number-of-parameters",
    `The start has ${expected} parameters but ${what} has ${found} entries. Give one entry a parameter, in the same order.`,
    { what, expected, found },
  );
}

export function badDistributionParameter(
  distribution: string,
  parameter: string,
  required: string,
  value: unknown,
  example: string,
): ModelError {
  return new ModelError(
    "bad-distribution-parameter",
    `Parameter \`${parameter}\` of \`distributions.${distribution}\` must be ${required}; ${String(value)} was given. Write, for example, \`${example}\`.`,
    { distribution, parameter, value },
  );
}

export function badProbability(asked: string, probability: unknown): ModelError {
  const isPercentage = typeof probability === "number" && probability > 1 && probability <= 100;
  return new ModelError(
    "bad-probability",
    `A probability must be a number from 0 to 1; ${String(probability)} was given to \`${asked}\`. Write \`${asked}(${isPercentage ? probability / 100 : 0.95})\`.`,
    { probability },
  );
}

export function badValue(asked: string, value: unknown): ModelError {
  return new ModelError(
    "bad-value",
    `\`${asked}\` takes one number; ${String(value)} was given. Give a single number, as in \`${asked}(3)\`; for a list, call it for each value with \`map\`.`,
    { value },
  );
}

export function notSavable(place: string, what: string): ModelError {
  return new ModelError(
    "not-savable",
    `${place} is a ${what}, which cannot be saved. Save results of this package, or plain lists, records and numbers.`,
    { place, what },
  );
}

export function noSavedResult(): ModelError {
  return new ModelError(
    "no-saved-result",
    'The text was not written by `saveResult`. Give the text of a saved result, as `loadResult(await readFile(path, "utf8"))`.',
  );
}

export function futureFormat(found: unknown, known: number): ModelError {
  return new ModelError(
    "newer-format",
    `The result was saved in format version ${String(found)}; this version of the package reads up to ${known}. Update the package, or save the result again with this one.`,
    { found, known },
  );
}
