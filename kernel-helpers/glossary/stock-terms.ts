import { type Term, termsOf } from "./term.js";

const term = termsOf("stock");

/** Terms of inventories. Common practice, no source. */
export const stockTerms: readonly Term[] = [
  term("available", "Stock on hand less what is promised to customers.", {
    mistakenFor: { "on hand": "a promised piece is still on the shelf" },
    related: ["on hand", "position"],
  }),
  term("backorder", "Demand that waits until goods arrive and is then met.", {
    mistakenFor: { "lost sale": "a lost sale does not wait and does not come back" },
    related: ["lost sale", "position"],
  }),
  term("book stock", "Stock according to the records.", {
    otherNames: ["book"],
    mistakenFor: { stocktake: "the difference from a count is shrinkage or a late entry" },
    related: ["stocktake"],
  }),
  term(
    "bullwhip effect",
    "Orders that vary more than the demand they follow, and more at each stage up the supply chain.",
    {
      otherNames: ["bullwhip"],
      formula: "variance of orders/variance of demand > 1",
      related: ["order policy"],
    },
  ),
  term(
    "censored demand",
    "Demand of a period in which stock ran out: sales show only that demand was at least that large.",
    {
      otherNames: ["censored sales"],
      mistakenFor: { "low demand": "treating sales as demand makes estimates too low" },
      related: ["lost sale", "censored value"],
    },
  ),
  term(
    "Croston's method",
    "Forecast of intermittent demand that smooths demand sizes and the intervals between them separately.",
    {
      otherNames: ["Croston"],
      formula: "demand per period = smoothed size/smoothed interval",
      mistakenFor: { "exponential smoothing": "smoothing all periods jumps after every demand" },
      related: ["intermittent demand", "exponential smoothing"],
    },
  ),
  term(
    "cycle service level",
    "Probability that stock lasts until the next delivery: the share of order cycles without a stockout.",
    {
      otherNames: ["cycle service"],
      unit: "per order cycle",
      mistakenFor: {
        "fill rate": "a cycle with one missing piece fails, although nearly all demand was met",
      },
      related: ["fill rate", "ready rate", "safety stock"],
    },
  ),
  term(
    "economic order quantity",
    "Order size with the lowest sum of ordering and holding cost for steady demand.",
    {
      otherNames: ["EOQ"],
      formula: "sqrt(2*demand*order cost/holding cost)",
      unit: "pieces",
      related: ["reorder point"],
    },
  ),
  term("exponential smoothing", "Forecast that moves a fixed fraction of the way to each new value.", {
    formula: "f[t+1] = f + alpha*(d - f)",
    related: ["Croston's method", "naive forecast"],
  }),
  term("fill rate", "Share of demand, in pieces, that is met at once from stock.", {
    formula: "1 - expected shortage per cycle/demand per cycle",
    mistakenFor: {
      "cycle service level": "counts cycles, not pieces; with large orders the fill rate is much higher",
      "ready rate": "counts time, not pieces",
    },
    related: ["cycle service level", "ready rate"],
  }),
  term("intermittent demand", "Demand with many periods of zero.", {
    otherNames: ["sporadic demand"],
    related: ["Croston's method"],
  }),
  term("lead time", "Time from the decision to order until the goods can be sold.", {
    unit: "periods",
    mistakenFor: {
      "protection interval": "lead time plus review period",
      "review period": "the time between two checks of the stock",
    },
    related: ["protection interval", "reorder point"],
  }),
  term(
    "lost sale",
    "Demand that is not met and does not wait. The record shows sales, so a stockout hides it.",
    {
      mistakenFor: { backorder: "a backorder appears later as a sale" },
      related: ["censored demand", "backorder"],
    },
  ),
  term(
    "newsvendor problem",
    "Choice of one order for a single period when unsold goods lose value and unmet demand is lost.",
    {
      otherNames: ["newsvendor"],
      formula: "order the quantile of demand at (price - cost)/(price - salvage value)",
      related: ["safety stock", "quantile"],
    },
  ),
  term("on hand", "Goods on the shelf now.", {
    unit: "pieces",
    mistakenFor: {
      available: "part of it may be promised",
      position: "the position also counts orders and backorders",
    },
    related: ["position", "available"],
  }),
  term("on order", "Goods ordered from the supplier that have not arrived.", {
    unit: "pieces",
    mistakenFor: { backorder: "a backorder is owed to a customer" },
    related: ["position", "lead time"],
  }),
  term("order policy", "Rule that decides when and how much to order, such as (s, S) or order-up-to.", {
    related: ["reorder point", "order-up-to level"],
  }),
  term("order-up-to level", "Position to which every order raises the stock.", {
    otherNames: ["order-up-to", "base stock"],
    formula: "expected demand in the protection interval + safety stock",
    unit: "pieces",
    related: ["reorder point", "protection interval", "position"],
  }),
  term(
    "position",
    "On hand plus on order less backorders. Orders must be based on it, or the same need is ordered twice.",
    {
      otherNames: ["inventory position"],
      formula: "on hand + on order - backorders",
      unit: "pieces",
      mistakenFor: { "on hand": "stock on hand ignores what is on order" },
      related: ["on hand", "on order"],
    },
  ),
  term(
    "protection interval",
    "Time that stock must last before the next order can arrive. Safety stock covers the demand of this interval.",
    {
      formula: "lead time + review period",
      unit: "periods",
      mistakenFor: { "lead time": "the lead time alone is enough only with continuous review" },
      related: ["lead time", "review period", "safety stock"],
    },
  ),
  term("ready rate", "Share of time with stock on the shelf.", {
    mistakenFor: { "fill rate": "equal only for steady demand of single pieces" },
    related: ["fill rate"],
  }),
  term("reorder point", "Position at which an order is placed.", {
    formula: "expected demand in the protection interval + safety stock",
    unit: "pieces",
    related: ["safety stock", "order-up-to level"],
  }),
  term("review period", "Time between two checks of the stock at which an order can be placed.", {
    unit: "periods",
    mistakenFor: { "lead time": "the time of the supplier" },
    related: ["protection interval"],
  }),
  term("safety stock", "Stock kept for demand above its expectation in the protection interval.", {
    otherNames: ["buffer stock"],
    formula: "z*sd of demand in the protection interval",
    unit: "pieces",
    mistakenFor: { "reorder point": "the reorder point also includes expected demand" },
    related: ["cycle service level", "fill rate", "protection interval"],
  }),
  term("service level", "A target for how much or how often demand is met. Always say which one is meant.", {
    mistakenFor: {
      "cycle service level": "probability of no stockout per order cycle",
      "fill rate": "share of demand met at once",
      "ready rate": "share of time with stock",
    },
    related: ["cycle service level", "fill rate", "ready rate"],
  }),
  term("shelf life", "Number of periods after which goods are discarded.", {
    unit: "periods",
    related: ["newsvendor problem"],
  }),
  term("stocktake", "A count of the goods on the shelf.", {
    mistakenFor: { "book stock": "the records may be wrong since the last count" },
    related: ["book stock"],
  }),
];
