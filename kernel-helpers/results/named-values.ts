import type { ModelError } from "../../src/numeric/index.js";

/** Looked up by the language itself: by `await` and by `JSON.stringify`. */
const lookedUp: readonly string[] = ["then", "toJSON"];

/**
 * Values by name, frozen. A name that is not there is an error: TypeScript cannot know the names, and an undefined
 * number would run on as NaN.
 */
export function namedValues<T>(
  values: Readonly<Record<string, T>>,
  missing: (name: string) => ModelError,
): Readonly<Record<string, T>> {
  return new Proxy(Object.freeze({ ...values }), {
    get(known, name): unknown {
      if (typeof name === "string" && !(name in known) && !lookedUp.includes(name)) throw missing(name);
      return Reflect.get(known, name);
    },
  });
}
