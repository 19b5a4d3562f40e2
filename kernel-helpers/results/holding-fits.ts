import type { UpdatedFit as EngineUpdatedFit } from "../../src/estimate/index.js";
import type {
  ChangePoint as EngineChangePoint,
  Check as EngineCheck,
  CompareOptions as EngineCompareOptions,
  Proposal as EngineProposal,
} from "../../src/evidence/index.js";
import type { Fit } from "./fit-shortcuts.js";

/** A fit looked at from all sides. */
export interface Check extends EngineCheck {
  readonly fit: Fit;
}

/** A search for a break in the parameters of a rule. */
export interface ChangePoint extends EngineChangePoint {
  readonly fit: Fit;
}

/** The catalogue tried on a record. */
export interface Proposal extends EngineProposal {
  readonly fits: readonly Fit[];
}

/** A fit brought up to date with rows that came in later. */
export interface UpdatedFit extends EngineUpdatedFit {
  readonly fit: Fit;
}

/** Options of `compare`. */
export interface CompareOptions extends Omit<EngineCompareOptions, "decide"> {
  /** What the client would be told by a fit; where rivals are not told apart, what each says is set side by side. */
  readonly decide?: (fit: Fit) => string;
}
