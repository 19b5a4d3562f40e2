/** How numbers are written: set by the analyst, never taken from the machine. */
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
 * Sets how tables and figures made from now on write their numbers.
 *
 * @param changes - what is to differ from the format in force; "standard" goes back to the first one.
 * @returns the format now in force.
 * @example numberFormat({ decimal: ",", group: " ", currency: "EUR" });
 */
export function numberFormat(changes: Partial<NumberFormat> | "standard" = {}): NumberFormat {
  current = changes === "standard" ? standard : Object.freeze({ ...current, ...changes });
  return current;
}

/** Plain digits with the signs of a format: "-1234.5" -> "-1.234,5". Digits below ten thousand group too. */
export function formatDigits(plain: string, format: NumberFormat): string {
  const [whole = "", fraction] = plain.split(".");
  const grouped = format.group === "" ? whole : whole.replace(/\B(?=(\d{3})+$)/g, () => format.group);
  return fraction === undefined ? grouped : `${grouped}${format.decimal}${fraction}`;
}
