import type { Rule } from "../rule.js";
import { catalogueRule, type NamedRuleOptions } from "./catalogue-rule.js";
import type { CatalogueEntry } from "./named-rule.js";
import { carryingCapacity, dimensionless, inStateUnit, level, positive, rate } from "./quantities.js";

const bounds = { r: positive, K: positive, C: positive, B: positive } as const;
const caught = ["C"] as const;
const shared = { B: level, r: rate, K: carryingCapacity, C: inStateUnit("catch a period") } as const;

const pellaTomlinson: CatalogueEntry = {
  name: "pellaTomlinson",
  title: "Pella-Tomlinson surplus production less catch",
  text: "ΔB = r/(m - 1)*B*(1 - (B/K)^(m - 1)) - C",
  source: "Pella and Tomlinson (1969), A generalized stock production model, Bull. IATTC 13, 419-496",
  quantities: { ...shared, m: dimensionless("shape: 2 is Schaefer's rule, near 1 Fox's") },
  optionalInputs: caught,
  validWhen: ["r > 0", "K > 0", "m > 0 and m != 1", "C >= 0", "B0 >= 0"],
  bounds: { ...bounds, m: positive },
  start: { r: 0.4, m: 2 },
  equilibria: [{ at: { B: "K" }, multiplier: "1 - r", when: "C == 0" }],
  closedForms: [],
  remarks: "Largest sustainable catch at B = K*m^(-1/(m - 1)).",
};

const schaefer: CatalogueEntry = {
  name: "schaefer",
  title: "Schaefer surplus production less catch",
  text: "ΔB = r*B*(1 - B/K) - C",
  source: "Schaefer (1954), Some aspects of the dynamics of populations, Bull. IATTC 1, 27-56",
  quantities: shared,
  optionalInputs: caught,
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
    "Largest sustainable catch r*K/4, taken at K/2. Below it there are two levels: the lower is unstable, and from below it the stock runs out.",
};

const fox: CatalogueEntry = {
  name: "fox",
  title: "Fox surplus production less catch",
  text: "ΔB = r*B*log(K/B) - C",
  source: "Fox (1970), An exponential surplus-yield model, Trans. Am. Fish. Soc. 99, 80-88",
  quantities: shared,
  optionalInputs: caught,
  validWhen: ["r > 0", "K > 0", "C >= 0", "B0 > 0"],
  bounds,
  start: { r: 0.4 },
  equilibria: [{ at: { B: "K" }, multiplier: "1 - r", when: "C == 0" }],
  closedForms: [],
  remarks: "Largest sustainable catch r*K/e, taken at K/e.",
};

/** ΔB = r/(m - 1) B (1 - (B/K)^(m - 1)) - C. */
export const pellaTomlinsonRule = (options?: NamedRuleOptions): Rule =>
  catalogueRule(pellaTomlinson, options);
/** ΔB = r B (1 - B/K) - C; C becomes an input with { inputs: ["C"] }. */
export const schaeferRule = (options?: NamedRuleOptions): Rule => catalogueRule(schaefer, options);
/** ΔB = r B log(K/B) - C. */
export const foxRule = (options?: NamedRuleOptions): Rule => catalogueRule(fox, options);
