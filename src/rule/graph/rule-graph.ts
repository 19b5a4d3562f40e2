import type { Graph } from "./graph.js";
import type { Node } from "./node.js";

/** A rule as one graph: the next value of every slot of the state vector, and every quantity. */
export interface RuleGraph {
  readonly graph: Graph;
  /** One per slot of the state vector: the states, then the lagged values. */
  readonly next: readonly Node[];
  /** One per quantity, in order of evaluation. */
  readonly quantities: readonly Node[];
  /** Length of the state vector. */
  readonly states: number;
  /** How many of its slots are states; the others are lagged values. */
  readonly observed: number;
  readonly parameters: number;
  readonly inputs: number;
}
