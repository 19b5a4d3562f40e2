import type { Rule } from "../rule.js";
import { catalogueRule, type NamedRuleOptions } from "./catalogue-rule.js";
import type { CatalogueEntry } from "./named-rule.js";
import {
  aboveOne,
  carryingCapacity,
  dimensionless,
  fraction,
  growthFactor,
  level,
  neverNegative,
  positive,
  quantityWithUnit,
} from "./quantities.js";

const speed = quantityWithUnit("maximum specific growth rate", "1/hour");
const stepLength = quantityWithUnit("length of one period", "hour");

const threePhase: CatalogueEntry = {
  name: "threePhase",
  title: "Three-phase linear growth of the logarithm: lag, exponential growth, stationary phase",
  text: "x[t+1] = min(xmax, x + mu*max(0, min(h, (t + 1)*h - lag)))",
  source: "Buchanan, Whiting and Damert (1997), When is simple good enough, Food Microbiology 14, 313-326",
  quantities: {
    x: dimensionless("natural logarithm of the density"),
    xmax: dimensionless("logarithm of the maximum density"),
    mu: speed,
    h: stepLength,
    lag: quantityWithUnit("lag: time before growth starts", "hour"),
  },
  validWhen: ["mu > 0", "h > 0", "lag >= 0", "x0 <= xmax"],
  bounds: { mu: positive, h: positive, lag: positive },
  equilibria: [],
  closedForms: [{ values: { x: "min(xmax, x0 + mu*max(0, t*h - lag))" } }],
  remarks: "Piecewise linear, and robust with few readings. It stays at xmax once it is reached.",
};

const baranyi: CatalogueEntry = {
  name: "baranyi",
  title: "Baranyi-Roberts growth with lag, in discrete time",
  text: "ready = q*exp(mu*h)\nq[t+1] = ready\nN[t+1] = N*exp(log((1 + ready)/(1 + q))*(1 - N/K))",
  source:
    "Baranyi and Roberts (1994), A dynamic approach to predicting bacterial growth, Int. J. Food Microbiol. 23, 277-294, in discrete time",
  quantities: {
    N: level,
    q: dimensionless("physiological state; lag = log(1 + 1/q0)/mu"),
    mu: speed,
    h: stepLength,
    K: carryingCapacity,
  },
  validWhen: ["mu > 0", "h > 0", "K > 0", "q0 > 0", "N0 >= 0"],
  bounds: { mu: positive, h: positive, K: positive, q: positive, N: positive },
  equilibria: [],
  closedForms: [{ values: { q: "q0*exp(mu*h*t)" } }],
  remarks: "q0 is not identifiable without readings during the lag. N levels off at K while q keeps growing.",
};

const resource: CatalogueEntry = {
  name: "resource",
  title: "Monod growth on a limiting resource (batch culture)",
  text: "grown = h*mu*S/(Ks + S)*N\nN[t+1] = N + grown\nS[t+1] = S - grown/Y",
  source: "Monod (1949), The growth of bacterial cultures, Ann. Rev. Microbiol. 3, 371-394, in discrete time",
  quantities: {
    N: level,
    S: quantityWithUnit("resource remaining", "mass"),
    mu: speed,
    h: stepLength,
    Ks: quantityWithUnit("half-saturation constant", "mass"),
    Y: dimensionless("yield: mass formed per mass of resource used"),
  },
  validWhen: ["mu > 0", "h > 0", "Ks > 0", "Y > 0", "N0 >= 0", "S0 >= 0", "h*mu*N0 <= Y*(Ks + S0)"],
  bounds: { mu: positive, h: positive, Ks: positive, Y: positive, N: positive, S: neverNegative },
  equilibria: [],
  closedForms: [],
  remarks:
    "N + Y*S is conserved. Choose h short enough for S to stay positive. mu and Ks are nearly confounded when S0 is much larger than Ks.",
};

const chemostat: CatalogueEntry = {
  name: "chemostat",
  title: "Chemostat in discrete time: Beverton-Holt growth, then dilution",
  text: "N[t+1] = (1 - d)*R*N/(1 + (R - 1)*N/K)",
  source: "common practice, no source",
  quantities: {
    N: level,
    d: dimensionless("fraction replaced per period"),
    R: growthFactor,
    K: carryingCapacity,
  },
  validWhen: ["R > 1", "K > 0", "d >= 0 and d < 1", "N0 >= 0"],
  bounds: { R: aboveOne, K: positive, d: fraction, N: positive },
  start: { R: 1.5, d: 0.1 },
  equilibria: [
    { at: { N: "0" }, multiplier: "(1 - d)*R" },
    { at: { N: "K*((1 - d)*R - 1)/(R - 1)" }, multiplier: "1/((1 - d)*R)", when: "(1 - d)*R > 1" },
  ],
  closedForms: [
    {
      when: "(1 - d)*R != 1",
      values: { N: "((1 - d)*R)^t*N0/(1 + (R - 1)/K*N0*(((1 - d)*R)^t - 1)/((1 - d)*R - 1))" },
    },
    { when: "(1 - d)*R == 1", values: { N: "N0/(1 + (R - 1)/K*N0*t)" } },
  ],
  remarks: "Washout if and only if (1 - d)*R is at most 1; the critical fraction is 1 - 1/R.",
};

const transfer: CatalogueEntry = {
  name: "transfer",
  title: "Serial transfer: density before each transfer",
  text: "N[t+1] = G*(N/D)/(1 + (G - 1)*(N/D)/K)",
  source: "common practice, no source",
  quantities: {
    N: level,
    G: dimensionless("growth factor between transfers at low density, R^(T/h)"),
    D: dimensionless("dilution factor per transfer"),
    K: carryingCapacity,
  },
  validWhen: ["G > 1", "D >= 1", "K > 0", "N0 >= 0"],
  bounds: { G: aboveOne, D: aboveOne, K: positive, N: positive },
  start: { G: 20, D: 10 },
  equilibria: [
    { at: { N: "0" }, multiplier: "G/D" },
    { at: { N: "K*(G - D)/(G - 1)" }, multiplier: "D/G", when: "G > D" },
  ],
  closedForms: [
    {
      when: "G != D",
      values: { N: "(G/D)^t*N0/(1 + (G - 1)/(D*K)*N0*((G/D)^t - 1)/(G/D - 1))" },
    },
  ],
  remarks:
    "Washout if and only if D is at least G. In the long run there are log2(D) generations per transfer.",
};

/** x' = min(xmax, x + mu (time of the period after the lag)). */
export const threePhaseRule = (options?: NamedRuleOptions): Rule => catalogueRule(threePhase, options);
/** q' = q e^(mu h), N' = N exp(log((1 + q')/(1 + q))(1 - N/K)). */
export const baranyiRule = (options?: NamedRuleOptions): Rule => catalogueRule(baranyi, options);
/** N' = N + h mu S/(Ks + S) N, S' = S - (N' - N)/Y. */
export const resourceRule = (options?: NamedRuleOptions): Rule => catalogueRule(resource, options);
/** N' = (1 - d) R N/(1 + (R - 1) N/K). */
export const chemostatRule = (options?: NamedRuleOptions): Rule => catalogueRule(chemostat, options);
/** N' = F(N/D), F Beverton-Holt with multiplier G. */
export const transferRule = (options?: NamedRuleOptions): Rule => catalogueRule(transfer, options);
