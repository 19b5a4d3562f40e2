import type { Rule } from "../rule.js";
import { catalogueRule, type NamedRuleOptions } from "./catalogue-rule.js";
import { type LagOption, lagged, periodCount } from "./lag.js";
import type { CatalogueEntry } from "./named-rule.js";
import {
  carryingCapacity,
  dimensionless,
  fraction,
  growthFactor,
  inStateUnit,
  level,
  perStateUnit,
  positive,
  quantityWithUnit,
  rate,
} from "./quantities.js";

const delayed = (lag: number): CatalogueEntry => ({
  name: "delayedDensity",
  title: `Delayed density dependence: Ricker with a lag of ${periodCount(lag)}`,
  text: `N[t+1] = N*exp(r*(1 - ${lagged("N", lag)}/K))`,
  source: "Levin and May (1976), A note on difference-delay equations, Theor. Popul. Biol. 9, 178-187",
  quantities: { N: level, r: rate, K: carryingCapacity },
  validWhen: ["r > 0", "K > 0", "N0 >= 0"],
  bounds: { r: positive, K: positive, N: positive },
  start: { r: 0.3 },
  equilibria: [{ at: { N: "0" } }, { at: { N: "K" }, ...(lag === 0 ? { multiplier: "1 - r" } : {}) }],
  closedForms: [],
  remarks: `With the lag T, stable if and only if r lies between 0 and 2*cos(pi*T/(2*T + 1)) = ${(2 * Math.cos((Math.PI * lag) / (2 * lag + 1))).toPrecision(6)}.`,
});

const host = quantityWithUnit("host density", "level");
const parasitoid = quantityWithUnit("parasitoid density", "level");
const search = perStateUnit("searching efficiency");
const yieldOf = dimensionless("parasitoids per attacked host");

const nicholsonBailey: CatalogueEntry = {
  name: "nicholsonBailey",
  title: "Nicholson-Bailey host-parasitoid model: random search",
  text: "spared = exp(-a*P)\nH[t+1] = lam*H*spared\nP[t+1] = c*H*(1 - spared)",
  source:
    "Nicholson and Bailey (1935), The balance of animal populations, Proc. Zool. Soc. Lond. 105, 551-598",
  quantities: { H: host, P: parasitoid, lam: growthFactor, a: search, c: yieldOf },
  validWhen: ["lam > 1", "a > 0", "c > 0", "H0 >= 0", "P0 >= 0"],
  bounds: { lam: [1, Number.POSITIVE_INFINITY], a: positive, c: positive, H: positive, P: positive },
  start: { lam: 2, c: 1 },
  equilibria: [{ at: { H: "lam*log(lam)/((lam - 1)*a*c)", P: "log(lam)/a" } }],
  closedForms: [],
  remarks: "Always unstable: oscillations grow until one of the two is extinct.",
};

const clumped: CatalogueEntry = {
  name: "clumpedParasitoid",
  title: "Host-parasitoid model with aggregated attacks (negative binomial)",
  text: "spared = (1 + a*P/k)^(-k)\nH[t+1] = lam*H*spared\nP[t+1] = c*H*(1 - spared)",
  source: "May (1978), Host-parasitoid systems in patchy environments, J. Anim. Ecol. 47, 833-844",
  quantities: {
    H: host,
    P: parasitoid,
    lam: growthFactor,
    a: search,
    c: yieldOf,
    k: dimensionless("aggregation: smaller values mean stronger clumping"),
  },
  validWhen: ["lam > 1", "a > 0", "c > 0", "k > 0", "H0 >= 0", "P0 >= 0"],
  bounds: {
    lam: [1, Number.POSITIVE_INFINITY],
    a: positive,
    c: positive,
    k: positive,
    H: positive,
    P: positive,
  },
  start: { lam: 2, c: 1, k: 0.5 },
  equilibria: [
    {
      at: {
        H: "lam*k*(lam^(1/k) - 1)/((lam - 1)*a*c)",
        P: "k*(lam^(1/k) - 1)/a",
      },
    },
  ],
  closedForms: [],
  remarks: "Stable if and only if k < 1.",
};

const competition: CatalogueEntry = {
  name: "competition",
  title: "Two-species competition (Leslie-Gower)",
  text: "N1[t+1] = R1*N1/(1 + (N1 + a12*N2)/M1)\nN2[t+1] = R2*N2/(1 + (N2 + a21*N1)/M2)",
  source:
    "Leslie and Gower (1958), The properties of a stochastic model for two competing species, Biometrika 45, 316-330",
  quantities: {
    N1: level,
    N2: level,
    R1: growthFactor,
    R2: growthFactor,
    M1: inStateUnit("crowding scale of species 1"),
    M2: inStateUnit("crowding scale of species 2"),
    a12: dimensionless("effect of one individual of species 2 on species 1"),
    a21: dimensionless("effect of one individual of species 1 on species 2"),
  },
  validWhen: ["R1 > 1", "R2 > 1", "M1 > 0", "M2 > 0", "a12 >= 0", "a21 >= 0", "N10 >= 0", "N20 >= 0"],
  bounds: {
    N1: positive,
    N2: positive,
    R1: positive,
    R2: positive,
    M1: positive,
    M2: positive,
    a12: positive,
    a21: positive,
  },
  start: { R1: 1.5, R2: 1.5, a12: 0.5, a21: 0.5 },
  equilibria: [
    { at: { N1: "0", N2: "0" } },
    { at: { N1: "M1*(R1 - 1)", N2: "0" } },
    { at: { N1: "0", N2: "M2*(R2 - 1)" } },
    {
      at: {
        N1: "(M1*(R1 - 1) - a12*M2*(R2 - 1))/(1 - a12*a21)",
        N2: "(M2*(R2 - 1) - a21*M1*(R1 - 1))/(1 - a12*a21)",
      },
      when: "a12*a21 != 1",
    },
  ],
  closedForms: [],
  remarks:
    "Both persist if and only if each can invade the equilibrium of the other. The system is monotone, so there is no chaos.",
};

/** The lag of recruitment, and whether more adults always mean more recruits. */
export interface RecruitOption extends LagOption {
  /** Whether more adults always mean more recruits, or too many mean fewer; default "rising". */
  readonly recruits?: "rising" | "humped";
}

function adults(lag: number, recruits: "rising" | "humped"): CatalogueEntry {
  const parents = lagged("B", lag);
  const born = recruits === "rising" ? `a*${parents}/(1 + b*${parents})` : `a*${parents}*exp(-b*${parents})`;
  const equilibrium = recruits === "rising" ? "(a/(1 - s) - 1)/b" : "log(a/(1 - s))/b";
  return {
    name: "adultsAndRecruits",
    title: `Adult survival with recruitment delayed by ${periodCount(lag)}`,
    text: `B[t+1] = s*B + ${born}`,
    source: "Clark (1976), A delayed-recruitment model of population dynamics, J. Math. Biol. 3, 381-391",
    quantities: {
      B: level,
      s: dimensionless("fraction of adults that survive one period"),
      a: growthFactor,
      b: perStateUnit("density dependence of recruitment"),
    },
    validWhen: ["s >= 0 and s < 1", "a > 0", "b > 0", "B0 >= 0"],
    bounds: { s: fraction, a: positive, b: positive, B: positive },
    start: { s: 0.6, a: 1 },
    equilibria: [{ at: { B: "0" } }, { at: { B: equilibrium }, when: "a > 1 - s" }],
    closedForms: [],
    remarks:
      "Equilibrium where (1 - s)*B equals recruitment. The delay can destabilize it when recruitment is hump-shaped (Ricker), not when it saturates (Beverton-Holt).",
  };
}

/** N' = N exp(r (1 - N[t-lag]/K)). */
export const delayedDensityRule = ({ lag, ...options }: NamedRuleOptions & LagOption): Rule =>
  catalogueRule(delayed(lag), options);
/** H' = lam H e^(-aP), P' = c H (1 - e^(-aP)). */
export const nicholsonBaileyRule = (options?: NamedRuleOptions): Rule =>
  catalogueRule(nicholsonBailey, options);
/** The same with (1 + aP/k)^(-k) spared. */
export const clumpedParasitoidRule = (options?: NamedRuleOptions): Rule => catalogueRule(clumped, options);
/** N1' = R1 N1/(1 + (N1 + a12 N2)/M1), and the same for N2. */
export const competitionRule = (options?: NamedRuleOptions): Rule => catalogueRule(competition, options);
/** B' = s B + F(B[t-lag]), F rising or humped. */
export const adultsAndRecruitsRule = ({
  lag,
  recruits = "rising",
  ...options
}: NamedRuleOptions & RecruitOption): Rule => catalogueRule(adults(lag, recruits), options);
