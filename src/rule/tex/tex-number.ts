/** A number as TeX, with powers of ten written out. */
export function texNumber(value: number | string): string {
  const [digits = "", exponent] = String(value).split(/e/iu);
  if (exponent === undefined) return digits;
  const power = `10^{${Number(exponent)}}`;
  return digits === "1" ? power : `${digits} \\times ${power}`;
}
