import type { Rule } from "../rule.js";
import { catalogueRule, type NamedRuleOptions } from "./catalogue-rule.js";
import { periodCount } from "./lag.js";
import type { CatalogueEntry, NamedQuantity } from "./named-rule.js";
import { dimensionless, fraction, inStateUnit, level, positive } from "./quantities.js";

const oneTo = (count: number): readonly number[] => Array.from({ length: count }, (_, i) => i + 1);

function record<T>(names: readonly string[], value: T): Record<string, T> {
  return Object.fromEntries(names.map((name) => [name, value]));
}

function ages(count: number): CatalogueEntry {
  const all = oneTo(count);
  const births = all.map((k) => `f${k}*n${k}`).join(" + ");
  const later = all.slice(1).map((k) => `n${k}[t+1] = s${k - 1}*n${k - 1}`);
  const survivals = all.slice(1).map((k) => `s${k - 1}`);
  const fertilities = all.map((k) => `f${k}`);
  return {
    name: "ages",
    title: `Leslie matrix with ${count} age classes`,
    text: [`n1[t+1] = ${births}`, ...later].join("\n"),
    source: "Leslie (1945), On the use of matrices in certain population mathematics, Biometrika 33, 183-212",
    quantities: {
      ...record(
        all.map((k) => `n${k}`),
        level,
      ),
      ...record(fertilities, dimensionless("offspring per period of one individual of that age")),
      ...record(survivals, dimensionless("fraction surviving to the next age")),
    },
    validWhen: [
      ...fertilities.map((name) => `${name} >= 0`),
      ...survivals.map((name) => `${name} >= 0 and ${name} <= 1`),
    ],
    bounds: { ...record(fertilities, positive), ...record(survivals, fraction) },
    equilibria: [
      {
        at: record(
          all.map((k) => `n${k}`),
          "0",
        ),
      },
    ],
    closedForms: [],
    remarks:
      "In the long run it grows by the dominant eigenvalue, with a stable age distribution; elasticities sum to 1.",
  };
}

/** Names of stages, and the possible moves between them; the fraction of a move not listed is zero. */
export interface StageOption {
  /** Names of the stages. */
  readonly stages: readonly string[];
  /** Moves that may happen, as pairs [from, to]; default every pair. */
  readonly moves?: readonly (readonly [from: string, to: string])[];
}

function stages({ stages: names, moves }: StageOption): CatalogueEntry {
  const all = moves ?? names.flatMap((from) => names.map((to) => [from, to] as const));
  const share = (from: string, to: string): string => `p_${from}_${to}`;
  const text = names.map((to) => {
    const terms = all.filter((move) => move[1] === to).map(([from]) => `${share(from, to)}*${from}`);
    return `${to}[t+1] = ${terms.length === 0 ? "0" : terms.join(" + ")}`;
  });
  const shares = all.map(([from, to]) => share(from, to));
  return {
    name: "stages",
    title: "Transition matrix between stages, such as delinquency buckets of a loan book",
    text: text.join("\n"),
    source: "common practice, no source",
    quantities: {
      ...record<NamedQuantity>(names, level),
      ...Object.fromEntries(
        all.map(([from, to]) => [
          share(from, to),
          dimensionless(`fraction of ${from} that moves to ${to} per period`),
        ]),
      ),
    },
    validWhen: shares.map((name) => `${name} >= 0`),
    bounds: record(shares, positive),
    equilibria: [],
    closedForms: [],
    remarks:
      "Absorbing stages, such as repaid and written off, only fill up. Fractions drift with season and policy.",
  };
}

/** Shelf life in periods, and which goods are issued first. */
export interface PerishableOption {
  /** Periods that goods last. */
  readonly life: number;
  /** Which goods are given out first; default "oldest-first". */
  readonly issue?: "oldest-first" | "newest-first";
}

function perishable(life: number, issue: "oldest-first" | "newest-first"): CatalogueEntry {
  const all = oneTo(life);
  const order = issue === "oldest-first" ? [...all].reverse() : all;
  const used = order.map((k, i) => {
    const left = ["d", ...order.slice(0, i).map((done) => `used${done}`)].join(" - ");
    return `used${k} = min(a${k}, ${left})`;
  });
  const next = all.slice(1).map((k) => `a${k}[t+1] = a${k - 1} - used${k - 1}`);
  const short = ["d", ...all.map((k) => `used${k}`)].join(" - ");
  return {
    name: "perishable",
    title: `Perishable stock with a shelf life of ${periodCount(life)}, ${issue === "oldest-first" ? "oldest" : "newest"} issued first`,
    text: [...used, `outdated = a${life} - used${life}`, `short = ${short}`, "a1[t+1] = q", ...next].join(
      "\n",
    ),
    source: "common practice, no source",
    inputs: ["q", "d"],
    quantities: {
      ...record(
        all.map((k) => `a${k}`),
        level,
      ),
      q: inStateUnit("quantity received at the end of the period"),
      d: inStateUnit("demand in the period"),
    },
    validWhen: all.map((k) => `a${k}0 >= 0`),
    bounds: record(
      all.map((k) => `a${k}`),
      positive,
    ),
    equilibria: [],
    closedForms: [],
    remarks: "The order of issue decides how much is wasted. Unmet demand is lost and reported as short.",
  };
}

/** How finely ages are told apart. */
export interface AgesOption {
  /** Number of age classes. */
  readonly ages: number;
}

/** n1' = f1 n1 + f2 n2 + ..., n2' = s1 n1, ... */
export const agesRule = ({ ages: count, ...options }: NamedRuleOptions & AgesOption): Rule =>
  catalogueRule(ages(count), options);
/** v' = P v, one fraction p_from_to for each move. */
export const stagesRule = ({ stages: names, moves, ...options }: NamedRuleOptions & StageOption): Rule =>
  catalogueRule(stages(moves === undefined ? { stages: names } : { stages: names, moves }), options);
/** Age classes a1 (newest) to the oldest, receipts q, demand d. */
export const perishableRule = ({
  life,
  issue = "oldest-first",
  ...options
}: NamedRuleOptions & PerishableOption): Rule => catalogueRule(perishable(life, issue), options);
