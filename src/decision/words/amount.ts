/**
 * A number with its unit, as a sentence writes it: "120 ×10⁴ cells/mL", "8.15 h", "300".
 *
 * A unit that begins with a power of ten is written as the factor that it is.
 */
export function amount(written: string, unit: string): string {
  const power = /^10\^(-?\d+)\s*/.exec(unit);
  if (power === null) return unit === "" ? written : `${written} ${unit}`;
  const rest = unit.slice(power[0].length);
  return `${written} ×10${raised(power[1]!)}${rest === "" ? "" : ` ${rest}`}`;
}

function raised(digits: string): string {
  return Array.from(digits, (digit) => (digit === "-" ? "⁻" : "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(digit)]!)).join("");
}

/** Rounded so that the uncertainty shows two digits; without one, to at most four. */
export function rounded(value: number, uncertainty?: number): string {
  if (uncertainty === undefined || !(uncertainty > 0)) return plain(value, 4);
  const decimals = decimalsFor(uncertainty);
  if (decimals >= 0) return value.toFixed(Math.min(decimals, 12));
  const unit = 10 ** -decimals;
  return plain(Math.round(value / unit) * unit, 15);
}

/** To no more digits than a Monte-Carlo error allows; to so many significant ones where there is none. */
export function withinError(value: number, error: number, digits: number): string {
  if (!(error > 0)) return plain(value, digits);
  const decimals = decimalsFor(error) - 1;
  const unit = 10 ** -Math.max(-15, Math.min(15, decimals));
  // Not -0, which toFixed writes with its sign.
  const whole = Math.round(value / unit) * unit + 0;
  return decimals > 0 ? whole.toFixed(Math.min(decimals, 12)).replace(/^-(0\.?0*)$/, "$1") : plain(whole, 15);
}

/** Decimals at which an uncertainty has its second digit; negative before the decimal sign. */
function decimalsFor(uncertainty: number): number {
  return 1 - Math.floor(Math.log10(uncertainty));
}

/** To so many significant digits, without a power of ten where plain digits will do. */
export function plain(value: number, digits: number): string {
  const short = Number(value.toPrecision(digits));
  return Math.abs(short) >= 1e15 || (short !== 0 && Math.abs(short) < 1e-6)
    ? short.toExponential()
    : `${short}`;
}

/** A share of paths in words: "in fewer than 1 in 1000 paths", "in about 3% of paths", "on every path". */
export function shareOfPaths(share: number, error: number, paths: number): string {
  if (share === 0) return `in fewer than 1 in ${plain(Math.floor(paths / 3), 1)} paths`;
  if (share === 1) return "on every path";
  if (share < 0.001) return "in fewer than 1 in 1000 paths";
  return `in about ${percent(share, error)} of paths`;
}

/** A share as a percentage, to no more digits than its Monte-Carlo error allows. */
export function percent(share: number, error: number): string {
  const decimals = error > 0 ? Math.max(0, Math.round(-Math.log10(100 * error))) : 1;
  return `${(100 * share).toFixed(Math.min(decimals, 6))}%`;
}

/** Words as a sentence begins with them: "the chance" with a capital, a name in small letters as "The value of owed". */
export function opened(words: string): string {
  if (words.startsWith("the ")) return `The ${words.slice(4)}`;
  return /^[a-z]/.test(words) ? `The value of ${words}` : words;
}

/** A level as a percentage: 0.95 -> "95%". */
export function percentWords(level: number): string {
  return `${Number((100 * level).toPrecision(12))}%`;
}
