import { isZero, type Rational, rational, rationalText, toNumber } from "../exact/rational.js";
import { type Complex, complex, minusC, modulus, overC, plusC, timesC } from "./complex.js";
import {
  asNumbers,
  characteristic,
  degree,
  type Polynomial,
  squareFreeFactors,
  valueAt,
} from "./polynomial.js";

/** A root of a characteristic polynomial, with how often it occurs. */
export interface ClosedRoot extends Complex {
  readonly modulus: number;
  readonly times: number;
  /** Text of the root where it is a fraction: "3/2". */
  readonly exact?: string;
}

function hornerC(coefficients: readonly number[], at: Complex): { value: Complex; slope: Complex } {
  let value = complex(0);
  let slope = complex(0);
  for (let i = coefficients.length - 1; i >= 0; i--) {
    slope = plusC(timesC(slope, at), value);
    value = plusC(timesC(value, at), complex(coefficients[i]!));
  }
  return { value, slope };
}

/**
 * All roots of a polynomial without repeated ones, together.
 *
 * @see Aberth (1973), Iteration methods for finding all zeros of a polynomial simultaneously, Math. Comp. 27, 339-344.
 */
function simpleRoots(coefficients: readonly number[]): readonly Complex[] {
  const size = coefficients.length - 1;
  const lead = Math.abs(coefficients[size]!);
  const radius = 1 + Math.max(...coefficients.slice(0, size).map((value) => Math.abs(value) / lead));
  let roots = Array.from({ length: size }, (_, k) => {
    const angle = (2 * Math.PI * k) / size + 0.4;
    return complex(0.5 * radius * Math.cos(angle), 0.5 * radius * Math.sin(angle));
  });
  for (let round = 0; round < 500; round++) {
    let moved = 0;
    roots = roots.map((root, k) => {
      const { value, slope } = hornerC(coefficients, root);
      if (modulus(value) === 0) return root;
      const newton = overC(value, slope);
      const pull = roots.reduce(
        (sum, other, j) => (j === k ? sum : plusC(sum, overC(complex(1), minusC(root, other)))),
        complex(0),
      );
      const step = overC(newton, minusC(complex(1), timesC(newton, pull)));
      moved = Math.max(moved, modulus(step) / Math.max(modulus(root), 1e-300));
      return minusC(root, step);
    });
    if (moved < 1e-15) break;
  }
  return roots;
}

/** The fraction with a small denominator nearest to a number, by continued fractions. */
function nearFraction(value: number): Rational {
  let [h0, h1, k0, k1] = [0n, 1n, 1n, 0n];
  let rest = value;
  for (let i = 0; i < 40; i++) {
    const whole = BigInt(Math.floor(rest));
    [h0, h1, k0, k1] = [h1, whole * h1 + h0, k1, whole * k1 + k0];
    const part = rest - Math.floor(rest);
    if (
      k1 > 1_000_000n ||
      part < 1e-9 ||
      Math.abs(Number(h1) / Number(k1) - value) <= 1e-14 * Math.abs(value)
    )
      break;
    rest = 1 / part;
  }
  return rational(h1, k1);
}

function describedRoot(factor: Polynomial, root: Complex, times: number): ClosedRoot {
  const real = Math.abs(root.im) <= 1e-10 * Math.max(modulus(root), 1e-6);
  if (real && Number.isFinite(root.re)) {
    const fraction = nearFraction(root.re);
    if (isZero(valueAt(factor, fraction))) {
      const re = toNumber(fraction);
      return { re, im: 0, modulus: Math.abs(re), times, exact: rationalText(fraction) };
    }
    return { re: root.re, im: 0, modulus: Math.abs(root.re), times };
  }
  return { re: root.re, im: root.im, modulus: modulus(root), times };
}

/** Roots of the characteristic polynomial of a matrix of fractions, largest modulus first, repeated ones exactly so. */
export function matrixRoots(matrix: readonly (readonly Rational[])[]): readonly ClosedRoot[] {
  return squareFreeFactors(characteristic(matrix))
    .flatMap(({ factor, times }) =>
      degree(factor) < 1
        ? []
        : simpleRoots(asNumbers(factor)).map((root) => describedRoot(factor, root, times)),
    )
    .sort((a, b) => b.modulus - a.modulus || b.re - a.re || b.im - a.im);
}
