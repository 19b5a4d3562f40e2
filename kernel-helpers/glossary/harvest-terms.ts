import { type Term, termsOf } from "./term.js";

const term = termsOf("harvest");

/** Terms of harvested populations. Common practice, no source. */
export const harvestTerms: readonly Term[] = [
  term("biomass", "Weight of the whole stock.", {
    unit: "tonnes",
    mistakenFor: { index: "an index is only proportional to biomass" },
    related: ["index", "catchability"],
  }),
  term("catch", "Everything taken, whether landed or thrown back.", {
    unit: "tonnes per period",
    mistakenFor: { landings: "landings exclude what was thrown back" },
    related: ["landings", "maximum sustainable yield"],
  }),
  term("catchability", "Factor between biomass and the index that is observed.", {
    otherNames: ["q"],
    formula: "index = q*biomass",
    related: ["index", "biomass"],
  }),
  term("effort", "Amount of fishing: days, trips, hauls, nets set.", {
    mistakenFor: { catch: "the same effort catches less from a smaller stock" },
    related: ["index"],
  }),
  term(
    "index",
    "A measure that is proportional to the stock, such as catch per unit of effort or a survey mean.",
    {
      otherNames: ["abundance index", "CPUE"],
      mistakenFor: { biomass: "an index has no unit of weight without its catchability" },
      related: ["catchability", "effort"],
    },
  ),
  term("landings", "The part of the catch that was brought ashore.", {
    unit: "tonnes per period",
    mistakenFor: { catch: "the catch also includes what was thrown back" },
    related: ["catch"],
  }),
  term(
    "maximum sustainable yield",
    "Largest catch that a population can replace in the long run. Fishing at its estimate is not safe, because the estimate is uncertain.",
    {
      otherNames: ["MSY"],
      formula: "r*K/4 at B = K/2 for the Schaefer rule",
      unit: "tonnes per period",
      mistakenFor: { target: "with a stock below K/2 the same catch leads to collapse" },
      related: ["surplus production", "equilibrium"],
    },
  ),
  term("stock", "A harvested population. In the field of inventories, goods on a shelf.", {
    mistakenFor: { inventory: "a report never combines the two meanings" },
    related: ["biomass"],
  }),
  term(
    "surplus production",
    "Growth of a stock beyond its losses, which can be harvested without shrinking it.",
    {
      formula: "B[t+1] = B + production(B) - catch",
      unit: "tonnes per period",
      related: ["maximum sustainable yield", "biomass"],
    },
  ),
];
