import type { Rule } from "../rule.js";
import { catalogueRule, type NamedRuleOptions } from "./catalogue-rule.js";
import type { CatalogueEntry } from "./named-rule.js";
import {
  aboveOne,
  carryingCapacity,
  dimensionless,
  growthFactor,
  inStateUnit,
  level,
  neverNegative,
  perStateUnit,
  positive,
  rate,
} from "./quantities.js";

const logistic: CatalogueEntry = {
  name: "logistic",
  title: "Discrete logistic (quadratic map)",
  text: "ΔN = r*N*(1 - N/K)",
  source: "May (1976), Simple mathematical models with very complicated dynamics, Nature 261, 459-467",
  quantities: { N: level, r: rate, K: carryingCapacity },
  validWhen: ["r > 0", "r <= 3", "K > 0", "N0 >= 0 and N0 <= K*(1 + 1/r)"],
  bounds: { r: positive, K: positive, N: neverNegative },
  start: { r: 0.5 },
  equilibria: [
    { at: { N: "0" }, multiplier: "1 + r" },
    { at: { N: "K" }, multiplier: "1 - r" },
  ],
  closedForms: [
    { when: "r == 1", values: { N: "K*(1 - (1 - N0/K)^(2^t))" } },
    { when: "r == 3", values: { N: "4*K/3*sin(2^t*asin(sqrt(3*N0/(4*K))))^2" } },
  ],
  remarks:
    "For r up to 1 it approaches K from one side, up to 2 with damped oscillations; a 2-cycle up to sqrt(6); chaos with periodic windows beyond about 2.570. Above 3 it leaves its range. There is no general closed form.",
};

const bevertonHolt: CatalogueEntry = {
  name: "bevertonHolt",
  title: "Beverton-Holt: the logistic curve sampled at equal steps",
  text: "N[t+1] = R*N/(1 + (R - 1)*N/K)",
  source: "Beverton and Holt (1957), On the Dynamics of Exploited Fish Populations",
  quantities: { N: level, R: growthFactor, K: carryingCapacity },
  validWhen: ["R > 1", "K > 0", "N0 >= 0"],
  bounds: { R: aboveOne, K: positive, N: positive },
  start: { R: 1.5 },
  equilibria: [
    { at: { N: "0" }, multiplier: "R" },
    { at: { N: "K" }, multiplier: "1/R" },
  ],
  closedForms: [{ values: { N: "K*N0/(N0 + (K - N0)*R^(-t))" } }],
  remarks:
    "Approaches K from one side and never oscillates. R is exp(r*h) of the logistic curve with step h.",
};

const ricker: CatalogueEntry = {
  name: "ricker",
  title: "Ricker",
  text: "N[t+1] = N*exp(r*(1 - N/K))",
  source: "Ricker (1954), Stock and recruitment, J. Fish. Res. Board Can. 11, 559-623",
  quantities: { N: level, r: rate, K: carryingCapacity },
  validWhen: ["r > 0", "K > 0", "N0 >= 0"],
  bounds: { r: positive, K: positive, N: positive },
  start: { r: 0.5 },
  equilibria: [
    { at: { N: "0" }, multiplier: "exp(r)" },
    { at: { N: "K" }, multiplier: "1 - r" },
  ],
  closedForms: [],
  remarks: "Stable for r below 2, a 2-cycle up to about 2.526, chaos from about 2.692. Never negative.",
};

const hassell: CatalogueEntry = {
  name: "hassell",
  title: "Hassell",
  text: "N[t+1] = lam*N/(1 + a*N)^b",
  source: "Hassell (1975), Density-dependence in single-species populations, J. Anim. Ecol. 44, 283-295",
  quantities: {
    N: level,
    lam: growthFactor,
    a: perStateUnit("crowding coefficient"),
    b: dimensionless("strength of density dependence"),
  },
  validWhen: ["lam > 1", "a > 0", "b > 0", "N0 >= 0"],
  bounds: { lam: aboveOne, a: positive, b: positive, N: positive },
  start: { lam: 1.5, b: 1 },
  equilibria: [
    { at: { N: "0" }, multiplier: "lam" },
    { at: { N: "(lam^(1/b) - 1)/a" }, multiplier: "1 - b*(1 - lam^(-1/b))" },
  ],
  closedForms: [{ when: "b == 1", values: { N: "lam^t*N0/(1 + a*N0*(lam^t - 1)/(lam - 1))" } }],
  remarks:
    "Approaches its equilibrium from one side for b up to 1; b = 1 is Beverton-Holt. Estimates of the three parameters are strongly correlated.",
};

const maynardSmithSlatkin: CatalogueEntry = {
  name: "maynardSmithSlatkin",
  title: "Maynard Smith-Slatkin",
  text: "N[t+1] = lam*N/(1 + (a*N)^b)",
  source: "Maynard Smith and Slatkin (1973), The stability of predator-prey systems, Ecology 54, 384-391",
  quantities: {
    N: level,
    lam: growthFactor,
    a: perStateUnit("crowding coefficient"),
    b: dimensionless("strength of density dependence"),
  },
  validWhen: ["lam > 1", "a > 0", "b > 0", "N0 >= 0"],
  bounds: { lam: aboveOne, a: positive, b: positive, N: positive },
  start: { lam: 1.5, b: 1 },
  equilibria: [
    { at: { N: "0" }, multiplier: "lam" },
    { at: { N: "(lam - 1)^(1/b)/a" }, multiplier: "1 - b*(1 - 1/lam)" },
  ],
  closedForms: [{ when: "b == 1", values: { N: "lam^t*N0/(1 + a*N0*(lam^t - 1)/(lam - 1))" } }],
  remarks:
    "From undercompensation (b below 1) to strong overcompensation; stable if and only if b*(1 - 1/lam) < 2.",
};

const thetaLogistic: CatalogueEntry = {
  name: "thetaLogistic",
  title: "Theta-logistic (Ricker form)",
  text: "N[t+1] = N*exp(r*(1 - (N/K)^theta))",
  source:
    "Gilpin and Ayala (1973), Global models of growth and competition, PNAS 70, 3590-3593, in Ricker's form",
  quantities: {
    N: level,
    r: rate,
    K: carryingCapacity,
    theta: dimensionless("shape: larger values delay density dependence"),
  },
  validWhen: ["r > 0", "K > 0", "theta > 0", "N0 >= 0"],
  bounds: { r: positive, K: positive, theta: positive, N: positive },
  start: { r: 0.5, theta: 1 },
  equilibria: [
    { at: { N: "0" }, multiplier: "exp(r)" },
    { at: { N: "K" }, multiplier: "1 - r*theta" },
  ],
  closedForms: [],
  remarks: "Stable for r*theta below 2. Near K, data determine only the product r*theta.",
};

const gompertz: CatalogueEntry = {
  name: "gompertz",
  title: "Discrete Gompertz",
  text: "N[t+1] = exp(a)*N^b",
  source: "Gompertz (1825), Phil. Trans. R. Soc. 115, 513-583, in discrete time",
  quantities: {
    N: level,
    a: dimensionless("intercept on the log scale"),
    b: dimensionless("slope on the log scale"),
  },
  validWhen: ["abs(b) < 1", "N0 > 0"],
  bounds: { b: [-1, 1], N: positive },
  start: { b: 0.8 },
  equilibria: [{ at: { N: "exp(a/(1 - b))" }, multiplier: "b" }],
  closedForms: [{ values: { N: "exp(b^t*log(N0) + a*(1 - b^t)/(1 - b))" } }],
  remarks:
    "Linear on the log scale: the log distance to equilibrium shrinks by the factor b each period. Per-capita growth is unbounded as N approaches zero, so do not extrapolate to inoculum size.",
};

const allee: CatalogueEntry = {
  name: "allee",
  title: "Strong Allee effect",
  text: "N[t+1] = N*exp(r*(1 - N/K)*(N/A - 1))",
  source:
    "Allee (1931), Animal Aggregations, for the effect; the exponential form is common practice, no source",
  quantities: {
    N: level,
    r: rate,
    K: carryingCapacity,
    A: inStateUnit("Allee threshold: below it the population collapses"),
  },
  validWhen: ["r > 0", "A > 0", "A < K", "N0 >= 0"],
  bounds: { r: positive, K: positive, A: positive, N: positive },
  start: { r: 0.3 },
  equilibria: [
    { at: { N: "0" }, multiplier: "exp(-r)" },
    { at: { N: "A" }, multiplier: "1 + r*(1 - A/K)" },
    { at: { N: "K" }, multiplier: "1 - r*(K/A - 1)" },
  ],
  closedForms: [],
  remarks:
    "A separates the basins of attraction: below A the population collapses, and so does one that overshoots K and lands below A.",
};

/** ΔN = r N (1 - N/K). */
export const logisticRule = (options?: NamedRuleOptions): Rule => catalogueRule(logistic, options);
/** N' = R N/(1 + (R - 1) N/K). */
export const bevertonHoltRule = (options?: NamedRuleOptions): Rule => catalogueRule(bevertonHolt, options);
/** N' = N exp(r (1 - N/K)). */
export const rickerRule = (options?: NamedRuleOptions): Rule => catalogueRule(ricker, options);
/** N' = lam N/(1 + a N)^b. */
export const hassellRule = (options?: NamedRuleOptions): Rule => catalogueRule(hassell, options);
/** N' = lam N/(1 + (a N)^b). */
export const maynardSmithSlatkinRule = (options?: NamedRuleOptions): Rule =>
  catalogueRule(maynardSmithSlatkin, options);
/** N' = N exp(r (1 - (N/K)^theta)). */
export const thetaLogisticRule = (options?: NamedRuleOptions): Rule => catalogueRule(thetaLogistic, options);
/** N' = e^a N^b. */
export const gompertzRule = (options?: NamedRuleOptions): Rule => catalogueRule(gompertz, options);
/** N' = N exp(r (1 - N/K)(N/A - 1)). */
export const alleeRule = (options?: NamedRuleOptions): Rule => catalogueRule(allee, options);
