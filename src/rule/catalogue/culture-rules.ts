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
  positive,
  quantityWithUnit,
} from "./quantities.js";

const speed = quantityWithUnit("largest growth rate", "1/hour");
const stepLength = quantityWithUnit("length of a period", "hour");

const threePhase: CatalogueEntry = {
  name: "threePhase",
  title: "Three-phase growth of the logarithm: lag, growth, level",
  text: "x[t+1] = min(xmax, x + mu*max(0, min(h, (t + 1)*h - lag)))",
  source: "Buchanan, Whiting and Damert (1997), When is simple good enough, Food Microbiology 14, 313-326",
  quantities: {
    x: dimensionless("natural logarithm of the level"),
    xmax: dimensionless("logarithm of the highest level"),
    mu: speed,
    h: stepLength,
    lag: quantityWithUnit("time before growth begins", "hour"),
  },
  validWhen: ["mu > 0", "h > 0", "lag >= 0", "x0 <= xmax"],
  bounds: { mu: positive, h: positive, lag: positive },
  equilibria: [],
  closedForms: [{ values: { x: "min(xmax, x0 + mu*max(0, t*h - lag))" } }],
  remarks: "Sharp corners, robust with few points. It rests at xmax.",
};

const baranyi: CatalogueEntry = {
  name: "baranyi",
  title: "Baranyi-Roberts growth with lag, in steps",
  text: "ready = q*exp(mu*h)\nq[t+1] = ready\nN[t+1] = N*exp(log((1 + ready)/(1 + q))*(1 - N/K))",
  source:
    "Baranyi and Roberts (1994), A dynamic approach to predicting bacterial growth, Int. J. Food Microbiol. 23, 277-294, stepped",
  quantities: {
    N: level,
    q: dimensionless("physiological readiness; lag = log(1 + 1/q0)/mu"),
    mu: speed,
    h: stepLength,
    K: carryingCapacity,
  },
  validWhen: ["mu > 0", "h > 0", "K > 0", "q0 > 0", "N0 >= 0"],
  bounds: { mu: positive, h: positive, K: positive, q: positive, N: positive },
  equilibria: [],
  closedForms: [{ values: { q: "q0*exp(mu*h*t)" } }],
  remarks: "q0 is not identified without readings inside the lag. N settles at K while q grows on.",
};

const resource: CatalogueEntry = {
  name: "resource",
  title: "Resource-limited batch growth",
  text: "grown = h*mu*S/(Ks + S)*N\nN[t+1] = N + grown\nS[t+1] = S - grown/Y",
  source: "Monod (1949), The growth of bacterial cultures, Ann. Rev. Microbiol. 3, 371-394, stepped",
  quantities: {
    N: level,
    S: quantityWithUnit("resource left", "mass"),
    mu: speed,
    h: stepLength,
    Ks: quantityWithUnit("resource at half speed", "mass"),
    Y: dimensionless("yield, mass for mass"),
  },
  validWhen: ["mu > 0", "h > 0", "Ks > 0", "Y > 0", "N0 >= 0", "S0 >= 0", "h*mu*N0 <= Y*(Ks + S0)"],
  bounds: { mu: positive, h: positive, Ks: positive, Y: positive, N: positive, S: positive },
  equilibria: [],
  closedForms: [],
  remarks:
    "N + Y*S never changes. h must be short enough for S to stay above zero. mu and Ks are nearly confounded when S0 is far above Ks.",
};

const chemostat: CatalogueEntry = {
  name: "chemostat",
  title: "Continuous culture in steps: Beverton-Holt growth, then dilution",
  text: "N[t+1] = (1 - d)*R*N/(1 + (R - 1)*N/K)",
  source: "common practice, no source",
  quantities: {
    N: level,
    d: dimensionless("share replaced in a period"),
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
  remarks: "Washed out if and only if (1 - d)*R is at most 1; the critical share is 1 - 1/R.",
};

const transfer: CatalogueEntry = {
  name: "transfer",
  title: "Serial transfer, level before each transfer",
  text: "N[t+1] = G*(N/D)/(1 + (G - 1)*(N/D)/K)",
  source: "common practice, no source",
  quantities: {
    N: level,
    G: dimensionless("multiplier between transfers at low level, R^(T/h)"),
    D: dimensionless("dilution factor of a transfer"),
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
  remarks: "Washed out if and only if D is at least G. In the long run log2(D) generations a transfer.",
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
