import { type Bundle, bundleOf } from "../tables/index.js";

/**
 * One bundle of several things that show themselves, in order: their HTML under each other, their texts a
 * blank line apart. Absent parts are passed over.
 */
export async function shownTogether(parts: readonly unknown[]): Promise<Bundle> {
  const bundles = await Promise.all(parts.map(bundleOf));
  const present = bundles.filter((bundle): bundle is Bundle => bundle !== undefined);
  return {
    "text/html": present.map((bundle) => bundle["text/html"] ?? "").join("\n"),
    "text/plain": present.map((bundle) => bundle["text/plain"] ?? "").join("\n\n"),
  };
}
