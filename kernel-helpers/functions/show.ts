import { inspect } from "node:util";
import { checkCall } from "../options/index.js";
import { type Bundle, bundleOf } from "../tables/index.js";

/** Anything with a kind that shows itself. */
export interface Shown {
  readonly kind: string;
}

/** Set by the kernel in a cell: takes a bundle, or the promise of one, and keeps the order of what is shown. */
type Display = (bundle: Bundle | Promise<Bundle>) => void;

/**
 * Shows a value where it stands in a cell, as it would show itself as the last expression. Outside a notebook its
 * text is printed.
 *
 * @example show(differences(counts));
 */
export function show(value: unknown): void {
  checkCall("show", arguments);
  const display = (globalThis as { [key: symbol]: unknown })[Symbol.for("periodwise.display")];
  const bundle = bundleOf(value).then((own) => own ?? { "text/plain": inspect(value) });
  if (typeof display === "function") (display as Display)(bundle);
  else void bundle.then((own) => process.stdout.write(`${own["text/plain"]}\n`));
}
