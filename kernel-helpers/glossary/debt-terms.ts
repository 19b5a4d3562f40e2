import { type Term, term } from "./term.js";

/** Words about debts. Common practice, no source. */
export const debtTerms: readonly Term[] = [
  term(
    "debts",
    "nominal rate",
    "A rate for a year that is divided by the number of periods to get the rate of one period, as a contract states it.",
    { "effective rate": "the effective rate is what the periods compound to in a year, and is higher" },
  ),
  term(
    "debts",
    "effective rate",
    "What one unit of money grows by in a year when the interest of every period is added and bears interest itself.",
    { "nominal rate": "the nominal rate leaves the compounding inside the year out" },
  ),
  term(
    "debts",
    "annual percentage rate",
    "The yearly rate that the law of a place makes a lender state. What counts as a charge and how the year is counted differ from law to law, so the law and its date belong to the figure.",
    { "effective rate": "the law decides which fees are in it and how it compounds" },
    ["APR"],
  ),
  term(
    "debts",
    "flat rate",
    "Interest computed on the sum first borrowed for the whole time, although it is being paid back. The true rate is nearly twice as high, so it is converted before anything is compared.",
    { "nominal rate": "a nominal rate is charged only on what is still owed" },
    ["add-on rate"],
  ),
  term("debts", "posting date", "The day on which an entry was written into the account.", {
    "value date": "interest runs from the value date",
  }),
  term("debts", "value date", "The day from which an entry bears interest or stops bearing it.", {
    "posting date": "an entry can be written down days earlier or later",
  }),
  term("debts", "arrears", "Payments that are due and have not been made.", {
    default: "arrears can be made good; default is the lender's declaration that they were not",
  }),
  term(
    "debts",
    "default",
    "The state that the contract says follows from unpaid arrears, with its own rights and rates.",
    { arrears: "being late is not yet default" },
  ),
  term(
    "debts",
    "delinquency bucket",
    "A class of how late an account is: up to 30 days, 31 to 60, and so on. A record of counts moves between buckets from month to month.",
    { arrears: "arrears are money; a bucket is a span of days" },
  ),
  term(
    "debts",
    "principal",
    "The part of the debt that is the borrowed sum itself, without interest and fees.",
    {
      outstanding: "outstanding includes what has been charged and not paid",
    },
  ),
  term(
    "debts",
    "outstanding",
    "All that is owed on a day: principal, charged interest and fees not yet paid.",
    {
      "settlement figure": "to close the account also takes interest up to that day and closing fees",
    },
  ),
  term(
    "debts",
    "settlement figure",
    "The sum that closes the account on a named day, interest to that day and closing fees included, rebates taken off.",
    { outstanding: "the balance of the statement does not close the account" },
  ),
];
