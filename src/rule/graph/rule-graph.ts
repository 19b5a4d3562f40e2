import type { Graph } from "./graph.js";
import type { Node } from "./node.js";

/** A rule as one graph: what every slot of the state vector becomes, and every quantity on the way. */
export interface RuleGraph {
  readonly graph: Graph;
  /** One a slot of the state vector: the states, then the kept past values. */
  readonly next: readonly Node[];
  /** One a quantity, in event order. */
  readonly quantities: readonly Node[];
  /** Length of the state vector. */
  readonly states: number;
  /** How many of its slots are states; the others are kept past values. */
  readonly observed: number;
  readonly parameters: number;
  readonly inputs: number;
}
