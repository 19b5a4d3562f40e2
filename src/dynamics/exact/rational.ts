/** An exact fraction in lowest terms; the denominator is positive. */
export interface Rational {
  readonly numerator: bigint;
  readonly denominator: bigint;
}

const size = (value: bigint): bigint => (value < 0n ? -value : value);

function commonDivisor(a: bigint, b: bigint): bigint {
  let [x, y] = [size(a), size(b)];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/** A fraction of two whole numbers; the denominator is not zero. */
export function rational(numerator: bigint, denominator = 1n): Rational {
  if (denominator === 1n) return { numerator, denominator };
  const divisor = commonDivisor(numerator, denominator) * (denominator < 0n ? -1n : 1n);
  return { numerator: numerator / divisor, denominator: denominator / divisor };
}

export const zero: Rational = rational(0n);
export const one: Rational = rational(1n);

export const plus = (a: Rational, b: Rational): Rational =>
  rational(a.numerator * b.denominator + b.numerator * a.denominator, a.denominator * b.denominator);
export const minus = (a: Rational, b: Rational): Rational =>
  rational(a.numerator * b.denominator - b.numerator * a.denominator, a.denominator * b.denominator);
export const times = (a: Rational, b: Rational): Rational =>
  rational(a.numerator * b.numerator, a.denominator * b.denominator);
export const over = (a: Rational, b: Rational): Rational =>
  rational(a.numerator * b.denominator, a.denominator * b.numerator);
export const negated = (a: Rational): Rational => ({ numerator: -a.numerator, denominator: a.denominator });
export const isZero = (a: Rational): boolean => a.numerator === 0n;
/** Negative, zero or positive as a is below, equal to or above b. */
export const compared = (a: Rational, b: Rational): number => {
  const gap = a.numerator * b.denominator - b.numerator * a.denominator;
  return gap < 0n ? -1 : gap > 0n ? 1 : 0;
};

/** The largest whole number not above a fraction. */
export function floorOf({ numerator, denominator }: Rational): bigint {
  const whole = numerator / denominator;
  return numerator < 0n && whole * denominator !== numerator ? whole - 1n : whole;
}

/** Reads "3", "-0.25", "1e-3" or "1/3". */
export function parseRational(text: string): Rational | undefined {
  const [above = "", below, ...rest] = text.split("/").map((part) => part.trim());
  const top = decimal(above);
  const bottom = below === undefined ? one : decimal(below);
  if (top === undefined || bottom === undefined || rest.length > 0 || isZero(bottom)) return undefined;
  return over(top, bottom);
}

function decimal(text: string): Rational | undefined {
  const [, sign = "", whole = "", part = "", exponent = "0"] =
    /^([+-]?)(\d*)(?:\.(\d*))?(?:[eE]([+-]?\d{1,4}))?$/u.exec(text) ?? [];
  if (whole === "" && part === "") return undefined;
  const digits = BigInt(`${whole}${part}`) * (sign === "-" ? -1n : 1n);
  const places = Number(exponent) - part.length;
  return places >= 0 ? rational(digits * 10n ** BigInt(places)) : rational(digits, 10n ** BigInt(-places));
}

/** The decimal that a computer number prints as: 0.1 is one tenth. */
export const fromDecimal = (value: number): Rational => parseRational(String(value))!;

/** The nearest computer number, also where numerator and denominator are too long for one. */
export function toNumber({ numerator, denominator }: Rational): number {
  const bits = (value: bigint): number => size(value).toString(2).length;
  // 64 leading bits of the quotient are more than a computer number keeps.
  const shift = 64 - (bits(numerator) - bits(denominator));
  const quotient =
    shift >= 0 ? (numerator << BigInt(shift)) / denominator : numerator / (denominator << BigInt(-shift));
  const half = Math.trunc(shift / 2);
  return Number(quotient) * 2 ** -half * 2 ** -(shift - half);
}

/** "7", "-1/3". */
export const rationalText = ({ numerator, denominator }: Rational): string =>
  denominator === 1n ? String(numerator) : `${numerator}/${denominator}`;
