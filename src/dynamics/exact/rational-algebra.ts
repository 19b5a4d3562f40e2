import type { Algebra, Operator } from "../../rule/index.js";
import { noRationalValue } from "../refusals.js";
import {
  compared,
  floorOf,
  fromDecimal,
  isZero,
  minus,
  negated,
  one,
  over,
  plus,
  type Rational,
  rational,
  times,
  zero,
} from "./rational.js";

const yes = (holds: boolean): Rational => (holds ? one : zero);
const isYes = (value: Rational): boolean => !isZero(value);
const sized = (a: Rational): Rational => (a.numerator < 0n ? negated(a) : a);
const floor = (a: Rational): Rational => rational(floorOf(a));

function divided(a: Rational, b: Rational): Rational {
  if (isZero(b)) throw noRationalValue("a division by zero");
  return over(a, b);
}

function power(base: Rational, exponent: Rational): Rational {
  const { numerator, denominator } = exponent;
  if (denominator !== 1n || numerator > 10_000n || numerator < -10_000n)
    throw noRationalValue("a power that is not a whole number");
  const raised = (by: bigint): Rational => ({
    numerator: base.numerator ** by,
    denominator: base.denominator ** by,
  });
  return numerator >= 0n ? raised(numerator) : divided(one, raised(-numerator));
}

/** Halves go away from zero, exactly. */
function round(a: Rational, digits: Rational): Rational {
  const scale = rational(10n ** digits.numerator);
  const whole = floorOf(plus(times(sized(a), scale), rational(1n, 2n)));
  return over(rational(a.numerator < 0n ? -whole : whole), scale);
}

const none = (name: Operator) => (): Rational => {
  throw noRationalValue(`the function ${name}`);
};

/** Exact fractions; functions whose values are no fractions are refused. */
export const rationalAlgebra: Algebra<Rational> = {
  number: fromDecimal,
  operations: {
    add: plus,
    subtract: minus,
    multiply: times,
    divide: divided,
    power,
    negate: negated,
    less: (a, b) => yes(compared(a, b) < 0),
    lessOrEqual: (a, b) => yes(compared(a, b) <= 0),
    equal: (a, b) => yes(compared(a, b) === 0),
    and: (a, b) => yes(isYes(a) && isYes(b)),
    or: (a, b) => yes(isYes(a) || isYes(b)),
    not: (a) => yes(!isYes(a)),
    choose: (a, b, c) => (isYes(a) ? b : c),
    abs: sized,
    sign: (a) => rational(BigInt(compared(a, zero))),
    min: (a, b) => (compared(a, b) <= 0 ? a : b),
    max: (a, b) => (compared(a, b) >= 0 ? a : b),
    floor,
    ceil: (a) => negated(floor(negated(a))),
    round,
    mod: (a, b) => minus(a, times(b, floor(divided(a, b)))),
    exp: none("exp"),
    log: none("log"),
    log10: none("log10"),
    sqrt: none("sqrt"),
    sin: none("sin"),
    cos: none("cos"),
    tan: none("tan"),
    asin: none("asin"),
  },
};
