import { describe, expect, test } from "vitest";
import { pivotedTriangle } from "../../src/numeric/algebra/pivoted-triangle.js";
import { sweepHeld } from "../../src/numeric/algebra/sweep-held.js";
import {
  choleskyFactor,
  choleskyInverse,
  choleskySolve,
  covarianceFromTriangle,
  rotateRowIn,
} from "../../src/numeric/index.js";
import { triangularise } from "../../src/numeric/least-squares/triangularise.js";

function close(found: ArrayLike<number>, expected: readonly number[], tolerance = 1e-13): void {
  expect(found.length).toBe(expected.length);
  expected.forEach((value, i) => {
    expect(Math.abs(found[i]! - value)).toBeLessThanOrEqual(tolerance * Math.max(1, Math.abs(value)));
  });
}

// The Hilbert matrix of order 4 has the whole-number inverse below.
// Source: Choi (1983), Tricks or treats with the Hilbert matrix, The American Mathematical Monthly 90:301.
const hilbert = Float64Array.from({ length: 16 }, (_, k) => 1 / (Math.floor(k / 4) + (k % 4) + 1));
const inverse = [
  16, -120, 240, -140, -120, 1200, -2700, 1680, 240, -2700, 6480, -4200, -140, 1680, -4200, 2800,
];

describe("the Cholesky factor", () => {
  test("inverts and solves", () => {
    const factor = choleskyFactor(hilbert, 4)!;
    // Condition number 1.6e4, so 11 digits remain.
    close(choleskyInverse(factor, 4), inverse, 1e-11);
    const sums = Float64Array.from({ length: 4 }, (_, i) =>
      hilbert.slice(4 * i, 4 * i + 4).reduce((a, b) => a + b),
    );
    close(choleskySolve(factor, sums, 4), [1, 1, 1, 1], 1e-11);
  });

  // By hand: [[4, 2], [2, 10]] = [[2, 0], [1, 3]] [[2, 1], [0, 3]].
  test("is the lower triangle, with zeros above the diagonal", () => {
    expect([...choleskyFactor(Float64Array.of(4, Number.NaN, 2, 10), 2)!]).toEqual([2, 0, 1, 3]);
  });

  test("does not exist for a matrix that is not positive definite in double precision", () => {
    expect(choleskyFactor(Float64Array.of(1, 2, 2, 1), 2)).toBeUndefined();
    expect(choleskyFactor(Float64Array.of(1, 1, 1, 1), 2)).toBeUndefined();
    // What is left of the last pivot is rounding of a third.
    expect(choleskyFactor(Float64Array.of(1, 1 / 3, 1 / 3, 1 / 9 + 2e-17), 2)).toBeUndefined();
    expect(choleskyFactor(Float64Array.of(Number.NaN), 1)).toBeUndefined();
  });
});

// A'A = [[15, 3, 8], [3, 13, 4], [8, 4, 10]] with determinant 980; its inverse over 490, by Python fractions.
const rows = [
  [2, 1, 0],
  [1, 3, 1],
  [0, 1, 2],
  [1, 1, 1],
  [3, -1, 2],
];
const products = [15, 3, 8, 3, 13, 4, 8, 4, 10];
const covariance = [57, 1, -46, 1, 43, -18, -46, -18, 93].map((value) => value / 490);

/** R'R of a triangle [3, 3]. */
function squared(triangle: ArrayLike<number>): number[] {
  return products.map((_, k) => {
    const [i, j] = [Math.floor(k / 3), k % 3];
    return [0, 1, 2]
      .filter((row) => row <= i && row <= j)
      .reduce((sum, row) => sum + triangle[3 * row + i]! * triangle[3 * row + j]!, 0);
  });
}

describe("a triangle", () => {
  const columns = (): Float64Array[] => [0, 1, 2].map((j) => Float64Array.from(rows, (row) => row[j]!));
  const right = [1, -2, 4, 0.5, 3];

  test("from reflections keeps the products of columns and residuals", () => {
    const triangle = new Float64Array(9);
    const projected = new Float64Array(3);
    expect(triangularise(columns(), Float64Array.from(right), triangle, projected)).toBe(true);
    close(squared(triangle), products);
    close(
      [0, 1, 2].map((j) =>
        [0, 1, 2].reduce((sum, i) => sum + (i <= j ? triangle[3 * i + j]! * projected[i]! : 0), 0),
      ),
      // A'r, by hand.
      [9.5, -3.5, 12.5],
    );
  });

  test("from plane rotations, row by row, is the same up to signs of its rows", () => {
    const triangle = new Float64Array(9);
    const projected = new Float64Array(3);
    rows.forEach((row, i) => {
      rotateRowIn(triangle, projected, Float64Array.from(row), right[i]!, 0, 3, 3);
    });
    close(squared(triangle), products);
    const reflected = new Float64Array(9);
    const by = new Float64Array(3);
    triangularise(columns(), Float64Array.from(right), reflected, by);
    close([...triangle].map(Math.abs), [...reflected].map(Math.abs));
    close([...projected].map(Math.abs), [...by].map(Math.abs));
  });

  test("from plane rotations may lie in wider rows and begin at a later column", () => {
    const triangle = new Float64Array(8);
    const projected = new Float64Array(2);
    rotateRowIn(triangle, projected, Float64Array.of(3, 5), 7, 0, 2, 4);
    rotateRowIn(triangle, projected, Float64Array.of(0, 12), 1, 1, 2, 4);
    // R'R = [[9, 15], [15, 25 + 144]], R'z = [21, 35 + 12].
    const [a, b, c] = [triangle[0]!, triangle[1]!, triangle[5]!];
    close([a * a, a * b, b * b + c * c], [9, 15, 169]);
    close([a * projected[0]!, b * projected[0]! + c * projected[1]!], [21, 47]);
    expect([...triangle].filter((value) => value === 0)).toHaveLength(5);
  });

  test("of columns without length stays zero there", () => {
    const triangle = new Float64Array(4).fill(9);
    const projected = new Float64Array(2);
    const zero = [new Float64Array(3), Float64Array.of(1, 2, 2)];
    expect(triangularise(zero, Float64Array.of(1, 1, 1), triangle, projected)).toBe(true);
    close([triangle[0]!, triangle[1]!, Math.abs(triangle[3]!)], [0, 1, Math.sqrt(8)]);
    close([projected[0]!, Math.abs(projected[1]!)], [1, 4 / Math.sqrt(8)]);
  });

  test("does not exist where an entry is not finite", () => {
    const broken = [Float64Array.of(1, Number.NaN)];
    expect(triangularise(broken, Float64Array.of(1, 1), new Float64Array(1), new Float64Array(1))).toBe(
      false,
    );
  });

  test("with more columns than rows has zeros where rows are missing", () => {
    const triangle = new Float64Array(4).fill(9);
    const projected = new Float64Array(2).fill(9);
    triangularise([Float64Array.of(3), Float64Array.of(4)], Float64Array.of(5), triangle, projected);
    expect([...triangle].map(Math.abs)).toEqual([3, 4, 9, 0]);
    expect([...projected].map(Math.abs)).toEqual([5, 0]);
  });
});

function triangleOf(matrix: readonly (readonly number[])[]): Float64Array {
  const size = matrix[0]!.length;
  const triangle = new Float64Array(size * size);
  const columns = matrix[0]!.map((_, j) => Float64Array.from(matrix, (row) => row[j]!));
  triangularise(columns, new Float64Array(matrix.length), triangle, new Float64Array(size));
  return triangle;
}

describe("pivoting", () => {
  test("brings columns to length 1 and keeps track of their order", () => {
    const { order, lengths, pivoted } = pivotedTriangle(triangleOf(rows), 3);
    close(lengths, [15, 13, 10].map(Math.sqrt));
    expect([...order].sort()).toEqual([0, 1, 2]);
    const scaled = (i: number, j: number): number => products[3 * i + j]! / (lengths[i]! * lengths[j]!);
    close(
      squared(pivoted),
      products.map((_, k) => scaled(order[Math.floor(k / 3)]!, order[k % 3]!)),
    );
    close([pivoted[3]!, pivoted[6]!, pivoted[7]!], [0, 0, 0], 0);
  });

  // The second column is nearly the first, of which it leaves 0.01/sqrt(1.0001); the third is at a right angle to both.
  test("takes the column next of which the others explain least", () => {
    const matrix = [
      [1, 1, 0],
      [0, 0.01, 0],
      [0, 0, 5],
    ];
    const { order, pivoted } = pivotedTriangle(triangleOf(matrix), 3);
    expect(order[2]).not.toBe(2);
    close(
      [0, 4, 8].map((k) => Math.abs(pivoted[k]!)),
      [1, 1, 0.01 / Math.sqrt(1.0001)],
    );
  });
});

describe("the covariance from a triangle", () => {
  test("is the inverse of the products, whatever the units", () => {
    const { covariance: found, determined, rank } = covarianceFromTriangle(triangleOf(rows), 3);
    close(found, covariance);
    expect([determined, rank]).toEqual([[true, true, true], 3]);
    const scaled = covarianceFromTriangle(triangleOf(rows.map(([a, b, c]) => [a! * 1e8, b!, c! * 1e-9])), 3);
    const units = [1e8, 1, 1e-9];
    scaled.covariance.forEach((value, k) => {
      const [i, j] = [Math.floor(k / 3), k % 3];
      expect(value * units[i]! * units[j]!).toBeCloseTo(covariance[k]!, 12);
    });
  });

  // The third column is twice the first less the second, so only the fourth is determined: by hand, its variance is
  // that given the first two, of which it is independent: 1/4.
  test("leaves out what some change of all together leaves without effect", () => {
    const matrix = [
      [1, 0, 2, 0],
      [1, 1, 1, 0],
      [0, 1, -1, 0],
      [0, 0, 0, 2],
    ];
    const { covariance: found, determined, rank } = covarianceFromTriangle(triangleOf(matrix), 4);
    expect([determined, rank]).toEqual([[false, false, false, true], 3]);
    found.forEach((value, k) => {
      if (k === 15) expect(value).toBeCloseTo(0.25, 14);
      else expect(value).toBeNaN();
    });
  });

  test("knows nothing of a column of zeros, and all of the others", () => {
    const matrix = [
      [0, 3, 0],
      [0, 4, 2],
    ];
    const { covariance: found, determined, rank } = covarianceFromTriangle(triangleOf(matrix), 3);
    expect([determined, rank]).toEqual([[false, true, true], 2]);
    // (A'A)^-1 of [[25, 8], [8, 4]] = 1/36 [[4, -8], [-8, 25]].
    close([found[4]!, found[5]!, found[7]!, found[8]!], [4 / 36, -8 / 36, -8 / 36, 25 / 36]);
    expect([0, 1, 2, 3, 6].map((k) => found[k])).toEqual([NaN, NaN, NaN, NaN, NaN]);
  });

  test("takes columns for dependent below a tolerance that the caller may widen", () => {
    const nearly = triangleOf([
      [1, 1],
      [0, 1e-8],
    ]);
    expect(covarianceFromTriangle(nearly, 2).rank).toBe(2);
    expect(covarianceFromTriangle(nearly, 2, 1e-7).rank).toBe(1);
    expect(covarianceFromTriangle(nearly, 2, 1e-7).determined).toEqual([false, false]);
  });
});

// H = [[4, 1, 2], [1, 3, 0], [2, 0, 5]]; inverses of it (over 43) and of its parts by Python fractions.
describe("sweeping out held arguments", () => {
  const of = (...values: number[]): Float64Array => Float64Array.from(values, (value) => value / 43);
  const whole = of(15, -5, -6, -5, 16, 2, -6, 2, 11);

  test("leaves the inverse of the part that moves", () => {
    const before = [...whole];
    const swept = sweepHeld(whole, [false, true, false]);
    close([swept[0]!, swept[2]!, swept[6]!, swept[8]!], [5 / 16, -1 / 8, -1 / 8, 1 / 4]);
    close(
      [1, 3, 4, 5, 7].map((k) => swept[k]!),
      [0, 0, 0, 0, 0],
    );
    const one = sweepHeld(whole, [true, false, true]);
    close(one, [0, 0, 0, 0, 1 / 3, 0, 0, 0, 0]);
    expect([...whole]).toEqual(before);
  });

  test("changes nothing where nothing is held, or where there is no curvature to sweep out", () => {
    expect(sweepHeld(whole, [false, false, false])).toBe(whole);
    expect([...sweepHeld(Float64Array.of(0, 1, 1, 2), [true, false])]).toEqual([0, 1, 1, 2]);
  });
});
