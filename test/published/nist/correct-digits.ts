/** Decimal digits in which a value agrees with a certified one: -log10 of the relative error, from 0 to 11. */
export function correctDigits(value: number | undefined, certified: number): number {
  if (value === undefined || Number.isNaN(value)) return 0;
  const error = Math.abs(value - certified) / Math.abs(certified);
  return error === 0 ? 11 : Math.min(11, Math.max(0, -Math.log10(error)));
}

/** The digits of the worst of several values. */
export function fewestDigits(values: ArrayLike<number | undefined>, certified: readonly number[]): number {
  return Math.min(...certified.map((value, i) => correctDigits(values[i], value)));
}
