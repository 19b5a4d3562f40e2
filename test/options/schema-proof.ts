// Compiled, not run: what makes a schema disagree with its type is an error of the compiler.
import {
  named,
  number,
  oneOf,
  optional,
  required,
  type Schema,
  text,
} from "../../kernel-helpers/options/option.js";

interface Options {
  readonly errors: "process" | "observation";
  readonly level?: number;
  readonly fixed?: Readonly<Record<string, number>>;
}

const errors = required(oneOf("process", "observation"), "Where the error lies");
const level = optional(number({ above: 0, below: 1 }, 0.95), "Level");
const fixed = optional(named(number({}, 1), "{ r: 1 }"), "Parameters held");
const loose = optional(oneOf("process", "observation"), "Where the error lies");
const strict = required(number({ above: 0, below: 1 }, 0.95), "Level");
const fewer = required(oneOf("process"), "Where the error lies");
const more = required(oneOf("process", "observation", "both"), "Where the error lies");
const texts = optional(named(text("q"), '{ r: "q" }'), "Parameters held");

export const same: Schema<Options> = { errors, level, fixed };

// @ts-expect-error: an option of the type is missing.
export const withoutOne: Schema<Options> = { errors, level };

// @ts-expect-error: an option that the type does not have.
export const withAnother: Schema<Options> = { errors, level, fixed, seed: level };

// @ts-expect-error: the type needs it.
export const withLoose: Schema<Options> = { errors: loose, level, fixed };

// @ts-expect-error: the type does not need it.
export const withStrict: Schema<Options> = { errors, level: strict, fixed };

// @ts-expect-error: a value of the choice is missing.
export const withFewer: Schema<Options> = { errors: fewer, level, fixed };

// @ts-expect-error: a value that the type does not admit.
export const withMore: Schema<Options> = { errors: more, level, fixed };

// @ts-expect-error: values of another type.
export const withTexts: Schema<Options> = { errors, level, fixed: texts };
