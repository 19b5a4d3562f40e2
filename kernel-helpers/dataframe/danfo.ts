import { createRequire } from "node:module";
import type { DataFrame } from "danfojs-node";

type Danfo = typeof import("danfojs-node");

const load = createRequire(__filename);

/** danfojs-node, loaded on first use: it takes a fifth of a second. */
export function danfo(): Danfo {
  return load("danfojs-node") as Danfo;
}

/** Recognised by shape, because a frame may come from another copy of the library. */
export function isFrame(value: unknown): value is DataFrame {
  if (typeof value !== "object" || value === null) return false;
  const frame = value as { columns?: unknown; values?: unknown; iloc?: unknown };
  return Array.isArray(frame.columns) && Array.isArray(frame.values) && typeof frame.iloc === "function";
}
