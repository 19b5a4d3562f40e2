import type { Rule } from "../rule.js";
import { catalogueRule, type NamedRuleOptions } from "./catalogue-rule.js";
import type { CatalogueEntry } from "./named-rule.js";
import { dimensionless, growthFactor, inStateUnit, level, positive } from "./quantities.js";

const constantChange: CatalogueEntry = {
  name: "constantChange",
  title: "Constant change",
  text: "x[t+1] = x + c",
  source: "common practice, no source",
  quantities: { x: level, c: inStateUnit("change per period") },
  validWhen: [],
  equilibria: [],
  closedForms: [{ values: { x: "x0 + c*t" } }],
  remarks: "No equilibrium unless c = 0; then every value is one.",
};

const geometric: CatalogueEntry = {
  name: "geometric",
  title: "Geometric growth or decline",
  text: "x[t+1] = R*x",
  source: "Malthus (1798), An Essay on the Principle of Population",
  quantities: { x: level, R: growthFactor },
  validWhen: ["R > 0"],
  bounds: { R: positive },
  start: { R: 1.1 },
  equilibria: [{ at: { x: "0" }, multiplier: "R" }],
  closedForms: [{ values: { x: "x0*R^t" } }],
  remarks: "Zero is stable if and only if R < 1. Doubling time log(2)/log(R) periods.",
};

const affine: CatalogueEntry = {
  name: "affine",
  title: "Affine rule: deposits, loans, dosing, mixing",
  text: "x[t+1] = a*x + b",
  source: "common practice, no source",
  quantities: {
    x: level,
    a: dimensionless("fraction kept, or 1 plus the interest rate per period"),
    b: inStateUnit("amount added per period"),
  },
  validWhen: [],
  start: { a: 1 },
  equilibria: [{ at: { x: "b/(1 - a)" }, multiplier: "a", when: "a != 1" }],
  closedForms: [
    { when: "a != 1", values: { x: "a^t*x0 + b*(1 - a^t)/(1 - a)" } },
    { when: "a == 1", values: { x: "x0 + b*t" } },
  ],
  remarks:
    "Stable if and only if abs(a) < 1. For a loan a = 1 + i and b = -p: the equilibrium p/i is unstable, and a debt above it grows without limit.",
};

const dosing: CatalogueEntry = {
  name: "dosing",
  title: "Repeated dosing: amount right after each dose",
  text: "M[t+1] = rho*M + D",
  source: "common practice, no source",
  quantities: {
    M: level,
    rho: dimensionless("fraction remaining after one interval, 2^(-interval/half-life)"),
    D: inStateUnit("dose"),
  },
  validWhen: ["rho > 0 and rho < 1"],
  bounds: { rho: [0, 1], D: positive },
  start: { rho: 0.5 },
  equilibria: [{ at: { M: "D/(1 - rho)" }, multiplier: "rho" }],
  closedForms: [{ values: { M: "rho^t*M0 + D*(1 - rho^t)/(1 - rho)" } }],
  remarks:
    "Peak D/(1 - rho), trough rho*D/(1 - rho), accumulation ratio 1/(1 - rho). A linear teaching example: not for dosing decisions.",
};

const driven: CatalogueEntry = {
  name: "driven",
  title: "Affine rule with an external driver",
  text: "x[t+1] = a*x + b + c*u",
  source: "common practice, no source",
  inputs: ["u"],
  quantities: {
    x: level,
    a: dimensionless("fraction kept"),
    b: inStateUnit("amount added per period"),
    c: inStateUnit("effect of one unit of the driver"),
    u: dimensionless("driver in the period"),
  },
  validWhen: [],
  equilibria: [{ at: { x: "(b + c*u)/(1 - a)" }, multiplier: "a", when: "a != 1" }],
  closedForms: [],
  remarks: "A forecast needs future values of the driver: give them as scenarios in `inputs`.",
};

/** x' = x + c. */
export const constantChangeRule = (options?: NamedRuleOptions): Rule =>
  catalogueRule(constantChange, options);
/** x' = R x. */
export const geometricRule = (options?: NamedRuleOptions): Rule => catalogueRule(geometric, options);
/** x' = a x + b. */
export const affineRule = (options?: NamedRuleOptions): Rule => catalogueRule(affine, options);
/** M' = rho M + D. */
export const dosingRule = (options?: NamedRuleOptions): Rule => catalogueRule(dosing, options);
/** x' = a x + b + c u, u an input. */
export const drivenRule = (options?: NamedRuleOptions): Rule => catalogueRule(driven, options);
