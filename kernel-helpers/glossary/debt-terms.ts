import { type Term, termsOf } from "./term.js";

const term = termsOf("debts");

/** Terms of loans and other debts. Common practice, no source. */
export const debtTerms: readonly Term[] = [
  term(
    "amortisation",
    "Repayment of a debt by instalments that pay the interest due and part of the principal.",
    {
      otherNames: ["amortization"],
      formula: "balance[t+1] = balance*(1 + i) - payment",
      related: ["instalment", "principal", "annuity"],
    },
  ),
  term(
    "annuity",
    "A series of equal payments at equal intervals. The level payment that repays a debt in n periods follows from its present value.",
    {
      formula: "payment = i*balance/(1 - (1 + i)^(-n))",
      unit: "money per period",
      mistakenFor: {
        instalment: "an instalment is any single payment of a plan, and plans need not be level",
      },
      related: ["present value", "amortisation"],
    },
  ),
  term(
    "annual percentage rate",
    "The yearly rate that a lender must state by law. Which charges are included and how the year is counted differ from law to law, so state the law and its date with the figure.",
    {
      otherNames: ["APR"],
      unit: "per year",
      mistakenFor: { "effective rate": "the law decides which fees are included and how interest compounds" },
      related: ["nominal rate", "effective rate"],
    },
  ),
  term("arrears", "Payments that are due and have not been made.", {
    unit: "money",
    mistakenFor: { default: "arrears can be made good; default is declared by the lender" },
    related: ["delinquency bucket", "default"],
  }),
  term("compounding", "Adding interest to the balance, so that it bears interest itself in later periods.", {
    formula: "balance after n periods = balance*(1 + i)^n",
    related: ["effective rate", "nominal rate"],
  }),
  term(
    "day count",
    "The convention for the number of days in a month and a year when interest is charged by days, such as actual/365 or 30/360.",
    {
      otherNames: ["day-count convention"],
      related: ["value date", "nominal rate"],
    },
  ),
  term(
    "default",
    "The state that, by the contract, follows from unpaid arrears, with its own rights and rates.",
    { mistakenFor: { arrears: "a late payment is not yet a default" }, related: ["arrears"] },
  ),
  term(
    "delinquency bucket",
    "A class of accounts by days past due: up to 30 days, 31 to 60, and so on. Counts move between buckets from month to month.",
    {
      unit: "accounts",
      mistakenFor: { arrears: "arrears are an amount of money; a bucket is a range of days" },
      related: ["arrears"],
    },
  ),
  term(
    "effective rate",
    "The growth of one unit of money in a year when the interest of every period is added and bears interest itself.",
    {
      otherNames: ["effective annual rate", "annual percentage yield", "APY"],
      formula: "(1 + j/m)^m - 1 for a nominal rate j and m periods a year",
      unit: "per year",
      mistakenFor: { "nominal rate": "the nominal rate ignores compounding within the year, and is lower" },
      related: ["compounding", "annual percentage rate"],
    },
  ),
  term(
    "flat rate",
    "Interest charged on the sum first borrowed for the whole term, although it is being repaid. The effective rate is nearly twice as high, so convert it before any comparison.",
    {
      otherNames: ["add-on rate"],
      unit: "per year",
      mistakenFor: { "nominal rate": "a nominal rate is charged only on what is still owed" },
      related: ["effective rate"],
    },
  ),
  term("instalment", "A single payment of an agreed plan.", {
    otherNames: ["installment"],
    unit: "money",
    related: ["annuity", "minimum payment", "amortisation"],
  }),
  term("interest rate", "The price of borrowed money per period, as a fraction of the balance.", {
    formula: "interest of a period = i*balance",
    unit: "per period",
    mistakenFor: {
      "annual percentage rate": "a rate per period must be converted to a yearly rate by compounding",
    },
    related: ["nominal rate", "effective rate", "flat rate"],
  }),
  term(
    "minimum payment",
    "The smallest payment that a revolving account requires in a period, often a percentage of the balance with a floor in money.",
    {
      formula: "max(floor, share*balance), and no more than the balance",
      unit: "money",
      mistakenFor: { instalment: "it shrinks with the balance, so the debt is repaid much more slowly" },
      related: ["instalment"],
    },
  ),
  term(
    "nominal rate",
    "A yearly rate, as stated in a contract, that is divided by the number of periods in a year to get the rate per period.",
    {
      formula: "i = j/m for m periods a year",
      unit: "per year",
      mistakenFor: {
        "effective rate": "the effective rate includes compounding within the year, and is higher",
      },
      related: ["effective rate", "compounding"],
    },
  ),
  term(
    "outstanding",
    "The total owed on a day: principal, and charged interest and fees that are not yet paid.",
    {
      otherNames: ["outstanding balance", "balance"],
      unit: "money",
      mistakenFor: {
        "settlement figure": "closing the account also takes interest up to that day and closing fees",
      },
      related: ["principal", "settlement figure"],
    },
  ),
  term("posting date", "The day on which an entry was written into the account.", {
    mistakenFor: { "value date": "interest runs from the value date" },
    related: ["value date"],
  }),
  term(
    "present value",
    "The amount today that is worth a series of future payments at a given interest rate.",
    {
      formula: "sum of payment[k]/(1 + i)^k; for n level payments p*(1 - (1 + i)^(-n))/i",
      unit: "money",
      related: ["annuity", "interest rate"],
    },
  ),
  term("principal", "The part of a debt that is the borrowed sum itself, without interest and fees.", {
    unit: "money",
    mistakenFor: { outstanding: "outstanding includes interest and fees that were charged and not paid" },
    related: ["outstanding", "amortisation"],
  }),
  term(
    "settlement figure",
    "The sum that closes an account on a given day: balance, interest to that day and closing fees, less rebates.",
    {
      otherNames: ["payoff amount", "redemption figure"],
      unit: "money",
      mistakenFor: { outstanding: "paying the balance of the statement does not close the account" },
      related: ["outstanding"],
    },
  ),
  term("value date", "The day from which an entry bears interest, or stops bearing it.", {
    mistakenFor: { "posting date": "an entry can be posted days earlier or later" },
    related: ["posting date", "day count"],
  }),
];
