import { type Term, term } from "./term.js";

/** Words about stock on a shelf. Common practice, no source. */
export const shelfTerms: readonly Term[] = [
  term("stock", "on hand", "What lies on the shelf now.", {
    available: "some of it may be promised",
    position: "position also counts what is ordered and what is owed to customers",
  }),
  term("stock", "on order", "What has been ordered from the supplier and has not arrived.", {
    backorder: "a backorder is owed by us to a customer",
  }),
  term(
    "stock",
    "position",
    "On hand plus on order less backorders. Orders are decided on it, or the same need is ordered twice.",
    { "on hand": "the shelf alone forgets what is on its way" },
    ["inventory position"],
  ),
  term("stock", "available", "On hand less what is promised to customers.", {
    "on hand": "a promised piece still lies on the shelf",
  }),
  term("stock", "backorder", "A demand that waits until goods arrive, and is then met.", {
    "lost sale": "the customer who goes elsewhere does not come back for it",
  }),
  term(
    "stock",
    "lost sale",
    "A demand that was not met and does not wait. The record shows sales, so an empty shelf hides it.",
    { backorder: "a backorder shows up later as a sale" },
  ),
  term("stock", "lead time", "From the decision to order until the goods can be sold, in periods.", {
    "review period": "the time between two looks at the stock",
    "protection interval": "lead time plus review period",
  }),
  term("stock", "review period", "The time between two looks at the stock at which an order may be placed.", {
    "lead time": "the supplier's time, not ours",
  }),
  term(
    "stock",
    "protection interval",
    "The time that stock must last before the next order can help: lead time plus review period. Safety stock covers the demand of this interval.",
    { "lead time": "the lead time alone is enough only where stock is watched without pause" },
  ),
  term(
    "stock",
    "cycle service",
    "The share of order cycles without a stockout: the probability that the shelf lasts until the goods arrive.",
    { "fill rate": "a cycle with one missing piece counts as failed, though nearly all demand was met" },
    ["cycle service level"],
  ),
  term(
    "stock",
    "fill rate",
    "The share of demand, in pieces, that is met at once from the shelf. One less the expected shortage of a cycle divided by the demand of a cycle.",
    {
      "cycle service": "counts cycles, not pieces; with large orders the fill rate is much the higher",
      "ready rate": "counts time, not pieces",
    },
  ),
  term("stock", "ready rate", "The share of time during which there is stock on the shelf.", {
    "fill rate": "equal only where demand comes piece by piece and evenly",
  }),
  term("stock", "stocktake", "A count of what lies on the shelf.", {
    book: "the books' figure may be wrong since the last count",
  }),
  term("stock", "book", "What the records say there should be.", {
    stocktake: "the difference to the count is shrinkage, or an entry made late",
  }),
];

/** Words about stock that is harvested. Common practice, no source. */
export const harvestTerms: readonly Term[] = [
  term("stock", "catch", "Everything taken, whether landed or thrown back.", {
    landings: "landings leave out what was thrown back",
  }),
  term("stock", "landings", "What was brought ashore.", { catch: "the catch also has what was thrown back" }),
  term("stock", "effort", "How much fishing was done: days, trips, hauls, nets set.", {
    catch: "the same effort catches less from a smaller stock",
  }),
  term(
    "stock",
    "index",
    "A measure that is taken to be in proportion to the stock, such as catch for each unit of effort or a survey's mean.",
    { biomass: "an index has no unit of weight until a factor ties it to the stock" },
  ),
  term(
    "stock",
    "stock",
    "Two things that are never put into one report: goods on a shelf, and a population of fish or plants that is harvested.",
  ),
];
