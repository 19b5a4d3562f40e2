import { ModelError } from "../../numeric/index.js";

export function noLogarithm(row: number, column: string, value: number): ModelError {
  return new ModelError(
    "no-logarithm",
    `Row ${row}, ${column}: level ${value} has no logarithm; choose censored, count model, or exclude.`,
    { row, column, value },
  );
}

export function noPairs(
  plan: { readonly order: number; readonly lag: number; readonly seasonal: number | undefined },
  groups: readonly { readonly index: Int32Array }[],
): ModelError {
  const longest = groups.reduce((most, { index }) => Math.max(most, index.length), 0);
  const season = plan.seasonal === undefined ? "" : `, season ${plan.seasonal}`;
  return new ModelError(
    "no-pairs",
    `No difference of order ${plan.order}, lag ${plan.lag}${season} can be formed: the longest series has ${longest} rows, ` +
      "and each difference needs rows exactly that far apart. Choose a shorter lag, or a longer record.",
    { ...plan, longest },
  );
}
