import type { Rule } from "../rule.js";
import { catalogueRule, type NamedRuleOptions } from "./catalogue-rule.js";
import { type LagOption, lagged } from "./lag.js";
import type { CatalogueEntry } from "./named-rule.js";
import { dimensionless, fraction, inStateUnit, level, positive } from "./quantities.js";

const smoothing: CatalogueEntry = {
  name: "smoothing",
  title: "Exponential smoothing",
  text: "f[t+1] = f + alpha*(d - f)",
  source: "Brown (1959), Statistical Forecasting for Inventory Control",
  inputs: ["d"],
  quantities: {
    f: level,
    alpha: dimensionless("weight of the newest demand"),
    d: inStateUnit("demand of the period"),
  },
  validWhen: ["alpha > 0", "alpha <= 1"],
  bounds: { alpha: fraction },
  start: { alpha: 0.2 },
  equilibria: [{ at: { f: "d" }, multiplier: "1 - alpha" }],
  closedForms: [{ values: { f: "d + (f0 - d)*(1 - alpha)^t" } }],
  remarks:
    "Weights alpha*(1 - alpha)^k, mean age (1 - alpha)/alpha. Stable for alpha from 0 to 2. The variance of f is alpha/(2 - alpha) that of demand.",
};

const trend: CatalogueEntry = {
  name: "levelAndTrend",
  title: "Level and trend smoothing",
  text: "raised = a*x[t+1] + (1 - a)*(l + b)\nl[t+1] = raised\nb[t+1] = g*(raised - l) + (1 - g)*b",
  source:
    "Holt (1957), Forecasting seasonals and trends by exponentially weighted moving averages, ONR Memorandum 52",
  inputs: ["x"],
  quantities: {
    l: level,
    b: inStateUnit("trend a period"),
    a: dimensionless("weight of the newest value"),
    g: dimensionless("weight of the newest trend"),
    x: inStateUnit("recorded value"),
  },
  validWhen: ["a > 0 and a < 1", "g > 0 and g < 1"],
  bounds: { a: fraction, g: fraction },
  start: { a: 0.3, g: 0.1 },
  equilibria: [{ at: { l: "x", b: "0" } }],
  closedForms: [],
  remarks: "The forecast h periods ahead is l + h*b.",
};

const croston: CatalogueEntry = {
  name: "sporadicDemand",
  title: "Sporadic demand: size and gap smoothed apart",
  text: "z[t+1] = if(x > 0, z + a*(x - z), z)\np[t+1] = if(x > 0, p + a*(q - p), p)\nq[t+1] = if(x > 0, 1, q + 1)",
  source: "Croston (1972), Forecasting and stock control for intermittent demands, Oper. Res. Q. 23, 289-303",
  inputs: ["x"],
  quantities: {
    z: inStateUnit("size of a demand"),
    p: dimensionless("periods between demands"),
    q: dimensionless("periods since the last demand"),
    a: dimensionless("weight of the newest demand"),
    x: inStateUnit("demand of the period"),
  },
  validWhen: ["a > 0 and a <= 1", "p0 > 0", "q0 >= 1"],
  bounds: { a: fraction },
  start: { a: 0.1 },
  equilibria: [],
  closedForms: [],
  remarks:
    "Rate z/p; (1 - a/2)*z/p takes away most of its bias where demand is rare. Nothing changes in empty periods but q.",
};

const inventory = (lag: number): CatalogueEntry => ({
  name: "inventory",
  title: `Inventory balance, orders arriving after ${lag} periods`,
  text: `I[t+1] = I + ${lagged("q", lag)} - d`,
  source: "common practice, no source",
  inputs: ["q", "d"],
  quantities: {
    I: level,
    q: inStateUnit("order placed in the period"),
    d: inStateUnit("demand of the period"),
  },
  validWhen: [],
  equilibria: [],
  closedForms: [],
  remarks: "It adds up and does not correct itself (slope 1): feedback comes from the order policy.",
});

const gapCorrection = (lag: number): CatalogueEntry => ({
  name: "gapCorrection",
  title: `Stock under an order policy that corrects a share of the gap, ${lag} periods late`,
  text: `I[t+1] = I + beta*(target - ${lagged("I", lag)})`,
  source: "Jury conditions for z^(L+1) - z^L + beta = 0; common practice, no source",
  quantities: {
    I: level,
    beta: dimensionless("share of the gap ordered"),
    target: inStateUnit("level aimed at"),
  },
  validWhen: ["beta > 0"],
  bounds: { beta: positive },
  start: { beta: 0.3 },
  equilibria: [{ at: { I: "target" }, ...(lag === 0 ? { multiplier: "1 - beta" } : {}) }],
  closedForms: lag === 0 ? [{ values: { I: "target + (I0 - target)*(1 - beta)^t" } }] : [],
  remarks: `Stable if and only if beta lies between 0 and 2*cos(pi*L/(2*L + 1)) = ${(2 * Math.cos((Math.PI * lag) / (2 * lag + 1))).toPrecision(6)}, orders on the way being ignored.`,
});

/** f' = f + alpha (d - f), d an input. */
export const smoothingRule = (options?: NamedRuleOptions): Rule => catalogueRule(smoothing, options);
/** l' = a x + (1 - a)(l + b), b' = g (l' - l) + (1 - g) b. */
export const levelAndTrendRule = (options?: NamedRuleOptions): Rule => catalogueRule(trend, options);
/** Size z and gap p, updated where there is a demand. */
export const sporadicDemandRule = (options?: NamedRuleOptions): Rule => catalogueRule(croston, options);
/** I' = I + q[t-lag] - d, q and d inputs. */
export const inventoryRule = ({ lag, ...options }: NamedRuleOptions & LagOption): Rule =>
  catalogueRule(inventory(lag), options);
/** I' = I + beta (target - I[t-lag]): demand is replaced and a share of the gap ordered. */
export const gapCorrectionRule = ({ lag, ...options }: NamedRuleOptions & LagOption): Rule =>
  catalogueRule(gapCorrection(lag), options);
