/** How numbers are written; never taken from the settings of the machine. */
export interface NumberFormat {
  /** Decimal sign: "." or ",". */
  readonly decimal: string;
  /** Put between groups of three digits before the decimal sign; "" for none. */
  readonly group: string;
  /** Currency written in the heading of a money column that states no unit; "" for none. */
  readonly currency: string;
  /** Digits of the currency's minor unit (ISO 4217: 2 for most, 0 or 3 for some). */
  readonly minorDigits: number;
}

const standard: NumberFormat = Object.freeze({ decimal: ".", group: ",", currency: "", minorDigits: 2 });
let current: NumberFormat = standard;

/**
 * Sets how later tables and figures write numbers.
 *
 * @param changes - the settings to change; "standard" restores the default format.
 * @returns the current format.
 * @example numberFormat({ decimal: ",", group: " ", currency: "EUR" });
 */
export function numberFormat(changes: Partial<NumberFormat> | "standard" = {}): NumberFormat {
  current = changes === "standard" ? standard : Object.freeze({ ...current, ...changes });
  return current;
}

/** Plain digits in a number format: "-1234.5" -> "-1.234,5". Numbers below ten thousand are grouped too. */
export function formatDigits(plain: string, format: NumberFormat): string {
  const [whole = "", fraction] = plain.split(".");
  const grouped = format.group === "" ? whole : whole.replace(/\B(?=(\d{3})+$)/g, () => format.group);
  return fraction === undefined ? grouped : `${grouped}${format.decimal}${fraction}`;
}
