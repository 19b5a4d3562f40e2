import { type FitOptions, onLogScale } from "../options/fit-options.js";

/** The scale on which a fit compares recorded and fitted values. */
export interface Scale {
  /** Whether differences are of logarithms. */
  readonly log: boolean;
  /** From the record's unit to the scale, and back. */
  readonly to: (value: number) => number;
  readonly from: (value: number) => number;
}

const plain = (value: number): number => value;

const naturalScale: Scale = { log: false, to: plain, from: plain };
const logScale: Scale = { log: true, to: Math.log, from: Math.exp };

/** The scale that the options ask for. */
export function scaleOf(options: FitOptions): Scale {
  return onLogScale(options) ? logScale : naturalScale;
}
