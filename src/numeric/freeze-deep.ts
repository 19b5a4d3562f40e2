/** Results that are frozen to their last part, so that one inside another is not walked again. */
const frozen = new WeakSet<object>();

/**
 * A list or a record of values; anything with a class of its own (a frame, a date, a typed array) is none. A record's
 * prototype is the root of its own realm: a cell may be run in another one than the package.
 */
function isPlain(value: unknown): value is object {
  if (typeof value !== "object" || value === null) return false;
  if (Array.isArray(value)) return true;
  const prototype: unknown = Object.getPrototypeOf(value);
  return prototype === null || Object.getPrototypeOf(prototype) === null;
}

const partsOf = (value: object): readonly unknown[] => (Array.isArray(value) ? value : Object.values(value));

/**
 * Freezes a result with all lists and records in it. Typed arrays cannot be frozen and stay writable; what was
 * frozen by this function before is not walked again, so a result that holds another one costs its own parts only.
 *
 * @returns the same value.
 * @example Object.isFrozen(freezeDeep({ groups: [{ name: "A" }] }).groups[0]); // true
 */
export function freezeDeep<T>(value: T): T {
  // Frozen already when met: by somebody else, or a moment ago because a part holds itself.
  const met = new Set<object>();
  const waiting: unknown[] = [value];
  while (waiting.length > 0) {
    const next = waiting.pop();
    if (!isPlain(next) || frozen.has(next) || met.has(next)) continue;
    if (Object.isFrozen(next)) met.add(next);
    else Object.freeze(next);
    for (const part of partsOf(next)) if (typeof part === "object") waiting.push(part);
  }
  if (isPlain(value)) frozen.add(value);
  return value;
}

/**
 * A frozen copy of what a caller holds, so that freezing a result never reaches into the caller's own lists and
 * records. Results, typed arrays, functions and objects with a class of their own are not copied.
 *
 * @example frozenCopy({ bounds: { r: [0, 1] } }).bounds.r; // [0, 1]
 */
export function frozenCopy<T>(given: T): T {
  // A copy has the shape of what was given.
  return freezeDeep(copyOf(given, new Map()) as T);
}

function copyOf(value: unknown, copies: Map<object, object>): unknown {
  if (!isPlain(value) || frozen.has(value)) return value;
  const known = copies.get(value);
  if (known !== undefined) return known;
  const copy = Array.isArray(value) ? value.slice() : { ...value };
  copies.set(value, copy);
  // Index by index: the keys of a long list would be as many texts.
  if (Array.isArray(copy)) for (let i = 0; i < copy.length; i++) copy[i] = copyOf(copy[i], copies);
  else for (const [name, part] of Object.entries(copy)) Reflect.set(copy, name, copyOf(part, copies));
  return copy;
}
