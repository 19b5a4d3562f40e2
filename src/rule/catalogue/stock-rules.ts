import type { Rule } from "../rule.js";
import { catalogueRule, type NamedRuleOptions } from "./catalogue-rule.js";
import { type LagOption, lagged, periodCount } from "./lag.js";
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
    alpha: dimensionless("weight of the latest demand"),
    d: inStateUnit("demand in the period"),
  },
  validWhen: ["alpha > 0", "alpha <= 1"],
  bounds: { alpha: fraction },
  start: { alpha: 0.2 },
  equilibria: [{ at: { f: "d" }, multiplier: "1 - alpha" }],
  closedForms: [{ values: { f: "d + (f0 - d)*(1 - alpha)^t" } }],
  remarks:
    "Weights alpha*(1 - alpha)^k; mean age (1 - alpha)/alpha. Stable for alpha between 0 and 2. The variance of f is alpha/(2 - alpha) times the variance of demand.",
};

const trend: CatalogueEntry = {
  name: "levelAndTrend",
  title: "Level and trend smoothing (Holt)",
  text: "smoothed = a*x[t+1] + (1 - a)*(l + b)\nl[t+1] = smoothed\nb[t+1] = g*(smoothed - l) + (1 - g)*b",
  source:
    "Holt (1957), Forecasting seasonals and trends by exponentially weighted moving averages, ONR Memorandum 52",
  inputs: ["x"],
  quantities: {
    l: level,
    b: inStateUnit("trend per period"),
    a: dimensionless("weight of the latest value"),
    g: dimensionless("weight of the latest trend"),
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
  title: "Intermittent demand (Croston): size and interval smoothed separately",
  text: "z[t+1] = if(x > 0, z + a*(x - z), z)\np[t+1] = if(x > 0, p + a*(q - p), p)\nq[t+1] = if(x > 0, 1, q + 1)",
  source: "Croston (1972), Forecasting and stock control for intermittent demands, Oper. Res. Q. 23, 289-303",
  inputs: ["x"],
  quantities: {
    z: inStateUnit("demand size"),
    p: dimensionless("interval between demands, in periods"),
    q: dimensionless("periods since the last demand"),
    a: dimensionless("weight of the latest demand"),
    x: inStateUnit("demand in the period"),
  },
  validWhen: ["a > 0 and a <= 1", "p0 > 0", "q0 >= 1"],
  bounds: { a: fraction },
  start: { a: 0.1 },
  equilibria: [],
  closedForms: [],
  remarks:
    "Demand per period z/p; (1 - a/2)*z/p removes most of its bias when demand is rare. In periods without demand only q changes.",
};

const inventory = (lag: number): CatalogueEntry => ({
  name: "inventory",
  title: `Inventory balance with a lead time of ${periodCount(lag)}`,
  text: `I[t+1] = I + ${lagged("q", lag)} - d`,
  source: "common practice, no source",
  inputs: ["q", "d"],
  quantities: {
    I: level,
    q: inStateUnit("order placed in the period"),
    d: inStateUnit("demand in the period"),
  },
  validWhen: [],
  equilibria: [],
  closedForms: [],
  remarks: "A balance without self-correction (multiplier 1): feedback comes from the order policy.",
});

const gapCorrection = (lag: number): CatalogueEntry => ({
  name: "gapCorrection",
  title: `Order policy that corrects a fraction of the gap, with a lead time of ${periodCount(lag)}`,
  text: `I[t+1] = I + beta*(target - ${lagged("I", lag)})`,
  source: "Jury conditions for z^(L+1) - z^L + beta = 0; common practice, no source",
  quantities: {
    I: level,
    beta: dimensionless("fraction of the gap ordered"),
    target: inStateUnit("target level"),
  },
  validWhen: ["beta > 0"],
  bounds: { beta: positive },
  start: { beta: 0.3 },
  equilibria: [{ at: { I: "target" }, ...(lag === 0 ? { multiplier: "1 - beta" } : {}) }],
  closedForms: lag === 0 ? [{ values: { I: "target + (I0 - target)*(1 - beta)^t" } }] : [],
  remarks: `With the lead time L, stable if and only if beta lies between 0 and 2*cos(pi*L/(2*L + 1)) = ${(2 * Math.cos((Math.PI * lag) / (2 * lag + 1))).toPrecision(6)}. Orders in transit are ignored.`,
});

/** f' = f + alpha (d - f), d an input. */
export const smoothingRule = (options?: NamedRuleOptions): Rule => catalogueRule(smoothing, options);
/** l' = a x + (1 - a)(l + b), b' = g (l' - l) + (1 - g) b. */
export const levelAndTrendRule = (options?: NamedRuleOptions): Rule => catalogueRule(trend, options);
/** Size z and interval p, updated in periods with demand. */
export const sporadicDemandRule = (options?: NamedRuleOptions): Rule => catalogueRule(croston, options);
/** I' = I + q[t-lag] - d, q and d inputs. */
export const inventoryRule = ({ lag, ...options }: NamedRuleOptions & LagOption): Rule =>
  catalogueRule(inventory(lag), options);
/** I' = I + beta (target - I[t-lag]): demand is replaced and a fraction of the gap is ordered. */
export const gapCorrectionRule = ({ lag, ...options }: NamedRuleOptions & LagOption): Rule =>
  catalogueRule(gapCorrection(lag), options);
