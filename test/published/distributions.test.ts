// Source: R 4.2.2, functions qt, qchisq, qf and qnorm, printed to 10 significant digits.
// Relative tolerance 1e-8, well above half a unit of the last digit printed (5e-10).
import { expect, test } from "vitest";
import {
  chiSquareCdf,
  chiSquareQuantile,
  fCdf,
  fQuantile,
  normalCdf,
  normalQuantile,
  studentCdf,
  studentQuantile,
} from "../../src/numeric/index.js";

const near = (value: number, expected: number): void =>
  expect(Math.abs(value / expected - 1)).toBeLessThan(1e-8);

test.each([
  [1, 12.70620474],
  [2, 4.30265273],
  [5, 2.570581836],
  [10, 2.228138852],
  [17, 2.109815578],
  [30, 2.042272456],
  [120, 1.979930405],
])("the Student t quantile at 0.975 with %i degrees of freedom is %f", (degrees, value) => {
  near(studentQuantile(0.975, degrees), value);
  near(studentCdf(value, degrees), 0.975);
});

test.each([
  [1, 3.841458821],
  [2, 5.991464547],
  [3, 7.814727903],
  [5, 11.07049769],
  [10, 18.30703805],
  [20, 31.41043284],
  [30, 43.77297183],
])("the chi-square quantile at 0.95 with %i degrees of freedom is %f", (degrees, value) => {
  near(chiSquareQuantile(0.95, degrees), value);
  near(chiSquareCdf(value, degrees), 0.95);
});

test.each([
  [1, 10, 4.964602744],
  [2, 17, 3.591530568],
  [3, 20, 3.098391212],
  [5, 30, 2.533554548],
])("the F quantile at 0.95 with %i and %i degrees of freedom is %f", (numerator, denominator, value) => {
  near(fQuantile(0.95, numerator, denominator), value);
  near(fCdf(value, numerator, denominator), 0.95);
});

test.each([
  [0.9, 1.281551566],
  [0.95, 1.644853627],
  [0.975, 1.959963985],
  [0.99, 2.326347874],
  [0.995, 2.575829304],
])("the normal quantile at %f is %f", (probability, value) => {
  near(normalQuantile(probability), value);
  near(normalCdf(value), probability);
});

// Source: Wichura (1988), Algorithm AS 241, Applied Statistics 37:477, test value -9.262340089798408, from memory;
// it lies where the direct formula loses digits.
test("the normal quantile keeps its digits in the far tail", () => {
  expect(Math.abs(normalQuantile(1e-20) / -9.26234008979841 - 1)).toBeLessThan(1e-14);
});

// Source: R 4.2.2: coverage of mean +- z s/sqrt(n) is 2 P(t(n - 1) < z) - 1, z = 1.959963985; 10 digits.
test.each([
  [5, 0.8784403402],
  [10, 0.9183508683],
  [20, 0.9351665229],
])("a normal interval for a mean of %i values covers %f", (count, coverage) => {
  near(2 * studentCdf(1.959963984540054, count - 1) - 1, coverage);
});
