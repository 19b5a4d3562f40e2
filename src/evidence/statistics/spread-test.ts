import { chiSquareUpperTail } from "../../numeric/index.js";
import type { ChiSquareTest } from "./portmanteau.js";

/** Whether scatter changes with the level: the test, and which way. */
export interface SpreadTest extends ChiSquareTest {
  /** Correlation of squared residual and fitted value: above 0 where the scatter grows with the level. */
  readonly correlation: number;
}

/**
 * Whether the squares of residuals follow the fitted values: n R^2 of their straight-line regression.
 *
 * @param residuals - [n].
 * @param fitted - [n], in the same order.
 * @see Koenker, R. (1981), A note on studentizing a test for heteroscedasticity, Journal of Econometrics 17.
 */
export function spreadTest(residuals: readonly number[], fitted: readonly number[]): SpreadTest {
  const correlation = correlationOf(
    residuals.map((residual) => residual * residual),
    fitted,
  );
  const statistic = residuals.length * correlation ** 2;
  return { statistic, degreesOfFreedom: 1, probability: chiSquareUpperTail(statistic, 1), correlation };
}

/** 0 where one side does not vary. */
function correlationOf(a: readonly number[], b: readonly number[]): number {
  const mean = (values: readonly number[]): number => values.reduce((sum, v) => sum + v, 0) / values.length;
  const [ma, mb] = [mean(a), mean(b)];
  let [ab, aa, bb] = [0, 0, 0];
  a.forEach((value, i) => {
    ab += (value - ma) * (b[i]! - mb);
    aa += (value - ma) ** 2;
    bb += (b[i]! - mb) ** 2;
  });
  return aa > 0 && bb > 0 ? ab / Math.sqrt(aa * bb) : 0;
}
