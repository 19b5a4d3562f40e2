import { type Term, term } from "./term.js";

/** Words about cultures. Common practice, no source. */
export const cultureTerms: readonly Term[] = [
  term(
    "cultures",
    "specific growth rate",
    "The growth of the logarithm of the density in a unit of time: mu, per hour. A culture with mu = 0.7 per hour grows by the factor e to the 0.7 in an hour.",
    {
      "doublings per hour": "mu divided by ln 2",
      "multiplier per period": "e to the power of mu times the length of the period",
    },
    ["mu"],
  ),
  term(
    "cultures",
    "doublings per hour",
    "How often the density doubles in an hour: the specific growth rate divided by ln 2.",
    {
      "specific growth rate": "about 1.44 times smaller in number: ln 2 of it for each doubling",
    },
  ),
  term(
    "cultures",
    "multiplier per period",
    "The factor from one reading to the next when readings are one period apart.",
    {
      "specific growth rate":
        "a factor, not a rate: its logarithm divided by the period's length is the rate",
    },
  ),
  term("cultures", "lag", "The time after a transfer in which cells adapt and the density hardly rises.", {
    "lag of a rule": "in a rule a lag is how many periods back a value is read",
  }),
  term(
    "cultures",
    "stationary phase",
    "The time after growth has ended in which the density stays about level.",
    {
      equilibrium: "a batch culture is held by what it has used up, and declines later",
    },
  ),
  term(
    "cultures",
    "biological replicate",
    "A separate culture grown under the same conditions. Only these say how much cultures differ.",
    { "technical replicate": "a second reading of the same culture says nothing about other cultures" },
  ),
  term(
    "cultures",
    "technical replicate",
    "A repeated reading of the same culture. It measures the instrument, not the biology.",
    { "biological replicate": "counting readings as cultures makes intervals far too narrow" },
  ),
];
