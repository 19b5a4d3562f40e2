/** danfojs-node's declarations name this type, and its package carries none. */
declare module "papaparse" {
  export interface ParseConfig {
    // Any setting of the reader, as danfojs-node hands them on.
    [setting: string]: unknown;
  }
}
