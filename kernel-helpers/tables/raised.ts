const superscripts: Readonly<Record<string, string>> = {
  "-": "⁻",
  "0": "⁰",
  "1": "¹",
  "2": "²",
  "3": "³",
  "4": "⁴",
  "5": "⁵",
  "6": "⁶",
  "7": "⁷",
  "8": "⁸",
  "9": "⁹",
};

/**
 * Whole powers of a unit as raised digits: units are read more easily so, and no markup is needed.
 *
 * @example raised("10^4 cells/mL"); // "10⁴ cells/mL"
 */
export function raised(text: string): string {
  return text.replace(/(?<=[\p{L}\d)])\^(-?\d{1,2})(?![\d.])/gu, (_, power: string) =>
    [...power].map((sign) => superscripts[sign] ?? sign).join(""),
  );
}
