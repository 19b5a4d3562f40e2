import type { Rule } from "../rule.js";
import { catalogueRule, type NamedRuleOptions } from "./catalogue-rule.js";
import type { CatalogueEntry } from "./named-rule.js";
import { carryingCapacity, dimensionless, inStateUnit, level, positive, rate } from "./quantities.js";

const bounds = { r: positive, K: positive, C: positive, B: positive } as const;
const catchInput = ["C"] as const;
const shared = { B: level, r: rate, K: carryingCapacity, C: inStateUnit("catch per period") } as const;

const pellaTomlinson: CatalogueEntry = {
  name: "pellaTomlinson",
  title: "Pella-Tomlinson surplus production with catch",
  text: "ΔB = r/(m - 1)*B*(1 - (B/K)^(m - 1)) - C",
  source: "Pella and Tomlinson (1969), A generalized stock production model, Bull. IATTC 13, 419-496",
  quantities: { ...shared, m: dimensionless("shape: m = 2 gives Schaefer, m near 1 gives Fox") },
  optionalInputs: catchInput,
  validWhen: ["r > 0", "K > 0", "m > 0 and m != 1", "C >= 0", "B0 >= 0"],
  bounds: { ...bounds, m: positive },
  start: { r: 0.4, m: 2 },
  equilibria: [{ at: { B: "K" }, multiplier: "1 - r", when: "C == 0" }],
  closedForms: [],
  remarks: "Maximum sustainable yield (MSY) at B = K*m^(-1/(m - 1)).",
};

const schaefer: CatalogueEntry = {
  name: "schaefer",
  title: "Schaefer surplus production with catch",
  text: "ΔB = r*B*(1 - B/K) - C",
  source: "Schaefer (1954), Some aspects of the dynamics of populations, Bull. IATTC 1, 27-56",
  quantities: shared,
  optionalInputs: catchInput,
  validWhen: ["r > 0", "K > 0", "C >= 0", "B0 >= 0"],
  bounds,
  start: { r: 0.4 },
  equilibria: [
    {
      at: { B: "K/2*(1 - sqrt(1 - 4*C/(r*K)))" },
      multiplier: "1 + r*sqrt(1 - 4*C/(r*K))",
      when: "C <= r*K/4",
    },
    {
      at: { B: "K/2*(1 + sqrt(1 - 4*C/(r*K)))" },
      multiplier: "1 - r*sqrt(1 - 4*C/(r*K))",
      when: "C < r*K/4",
    },
  ],
  closedForms: [],
  remarks:
    "Maximum sustainable yield (MSY) r*K/4, at B = K/2. With a smaller catch there are two equilibria: the lower one is unstable, and a stock below it collapses.",
};

const fox: CatalogueEntry = {
  name: "fox",
  title: "Fox surplus production with catch",
  text: "ΔB = r*B*log(K/B) - C",
  source: "Fox (1970), An exponential surplus-yield model, Trans. Am. Fish. Soc. 99, 80-88",
  quantities: shared,
  optionalInputs: catchInput,
  validWhen: ["r > 0", "K > 0", "C >= 0", "B0 > 0"],
  bounds,
  start: { r: 0.4 },
  equilibria: [{ at: { B: "K" }, multiplier: "1 - r", when: "C == 0" }],
  closedForms: [],
  remarks: "Maximum sustainable yield (MSY) r*K/e, at B = K/e.",
};

/** ΔB = r/(m - 1) B (1 - (B/K)^(m - 1)) - C. */
export const pellaTomlinsonRule = (options?: NamedRuleOptions): Rule =>
  catalogueRule(pellaTomlinson, options);
/** ΔB = r B (1 - B/K) - C; C becomes an input with { inputs: ["C"] }. */
export const schaeferRule = (options?: NamedRuleOptions): Rule => catalogueRule(schaefer, options);
/** ΔB = r B log(K/B) - C. */
export const foxRule = (options?: NamedRuleOptions): Rule => catalogueRule(fox, options);
