/// <reference path="./papaparse.d.ts" />

/** Settings of a plot, as danfojs-node's declarations mention them. */
export interface Config {
  [setting: string]: unknown;
}
/** Layout of a plot, as danfojs-node's declarations mention it. */
export interface Layout {
  [setting: string]: unknown;
}
