import { cultureTerms } from "./culture-terms.js";
import { debtTerms } from "./debt-terms.js";
import { dynamicsTerms } from "./dynamics-terms.js";
import { evidenceTerms } from "./evidence-terms.js";
import { fittingTerms } from "./fitting-terms.js";
import { forecastTerms } from "./forecast-terms.js";
import { harvestTerms } from "./harvest-terms.js";
import { ruleTerms } from "./rule-terms.js";
import { stockTerms } from "./stock-terms.js";
import type { Term } from "./term.js";

/** All terms, grouped by field. */
export const terms: readonly Term[] = Object.freeze([
  ...debtTerms,
  ...cultureTerms,
  ...stockTerms,
  ...harvestTerms,
  ...dynamicsTerms,
  ...fittingTerms,
  ...evidenceTerms,
  ...forecastTerms,
  ...ruleTerms(),
]);
