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
 * Integer powers in a unit as superscript digits, and "×" between a number and a power of ten.
 *
 * @example superscript("120 10^4 cells/mL"); // "120 × 10⁴ cells/mL"
 */
export function superscript(text: string): string {
  const multiplied = text.replace(/(?<=\d) +(?=10\^-?\d)/g, " × ");
  return multiplied.replace(/(?<=[\p{L}\d)])\^(-?\d{1,2})(?![\d.])/gu, (_, power: string) =>
    [...power].map((sign) => superscripts[sign] ?? sign).join(""),
  );
}
