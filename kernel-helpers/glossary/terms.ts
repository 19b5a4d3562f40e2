import { cultureTerms } from "./culture-terms.js";
import { debtTerms } from "./debt-terms.js";
import { harvestTerms, shelfTerms } from "./stock-terms.js";
import type { Term } from "./term.js";

/** Every word explained, in the order of the fields. */
export const terms: readonly Term[] = Object.freeze([
  ...debtTerms,
  ...cultureTerms,
  ...shelfTerms,
  ...harvestTerms,
]);

/** The term of that name or other name, whatever the case; `undefined` when there is none. */
export function termOf(name: string): Term | undefined {
  const wanted = name.trim().toLowerCase();
  return terms.find((one) => [one.name, ...one.otherNames].some((known) => known.toLowerCase() === wanted));
}
