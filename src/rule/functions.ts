/** A function of the rule language. */
export interface RuleFunction {
  readonly name: string;
  readonly minArgs: number;
  readonly maxArgs: number;
  /** How it is written. */
  readonly usage: string;
  readonly meaning: string;
}

const entry = (
  name: string,
  minArgs: number,
  maxArgs: number,
  usage: string,
  meaning: string,
): RuleFunction => Object.freeze({ name, minArgs, maxArgs, usage, meaning });

/** Every function of the rule language. A name that is not here is not a function. */
export const ruleFunctions: readonly RuleFunction[] = Object.freeze([
  entry("exp", 1, 1, "exp(x)", "e to the power x"),
  entry("log", 1, 1, "log(x)", "natural logarithm"),
  entry("log10", 1, 1, "log10(x)", "logarithm to base 10"),
  entry("sqrt", 1, 1, "sqrt(x)", "square root"),
  entry("abs", 1, 1, "abs(x)", "absolute value"),
  entry("sign", 1, 1, "sign(x)", "sign of x: -1, 0 or 1"),
  entry("min", 2, 20, "min(a, b, ...)", "smallest of the arguments"),
  entry("max", 2, 20, "max(a, b, ...)", "largest of the arguments"),
  entry("floor", 1, 1, "floor(x)", "x rounded down to a whole number"),
  entry("ceil", 1, 1, "ceil(x)", "x rounded up to a whole number"),
  entry("round", 1, 2, "round(x, decimals)", "x rounded to decimals (default 0), halves away from zero"),
  entry("mod", 2, 2, "mod(x, m)", "remainder of x divided by m, with the sign of m"),
  entry("sin", 1, 1, "sin(x)", "sine of x in radians"),
  entry("cos", 1, 1, "cos(x)", "cosine of x in radians"),
  entry("tan", 1, 1, "tan(x)", "tangent of x in radians"),
  entry("asin", 1, 1, "asin(x)", "angle in radians whose sine is x"),
  entry("if", 3, 3, "if(condition, a, b)", "a if the condition is true, otherwise b"),
  entry(
    "change",
    1,
    1,
    "change(X) = ...",
    "sets the change of state X from this period to the next; same as ΔX = ...",
  ),
]);

const byName: ReadonlyMap<string, RuleFunction> = new Map(ruleFunctions.map((one) => [one.name, one]));

/** The function of that name; undefined when there is none. */
export const ruleFunction = (name: string): RuleFunction | undefined => byName.get(name);

/** Names that no state, quantity, input or parameter may have. */
export const reservedWords: ReadonlySet<string> = new Set([
  "t",
  "and",
  "or",
  "not",
  "constructor",
  "prototype",
  "__proto__",
  ...byName.keys(),
]);
