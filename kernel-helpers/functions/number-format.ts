import { checkCall } from "../options/index.js";
import { type NumberFormat, numberFormat as setFormat } from "../wording/index.js";

/**
 * Sets how tables and figures made from now on write their numbers.
 *
 * @param changes - what is to differ from the format in force; "standard" goes back to the first one.
 * @returns the format now in force.
 * @example numberFormat({ decimal: ",", group: " ", currency: "EUR" });
 */
export function numberFormat(changes: Partial<NumberFormat> | "standard" = {}): NumberFormat {
  checkCall("numberFormat", arguments);
  return setFormat(changes);
}
