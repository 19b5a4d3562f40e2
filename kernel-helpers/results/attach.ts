/**
 * Adds members to a result that its listings, copies and transfers do not meet: a result goes to a worker, into JSON
 * or into a comparison as the plain data that it is. Each is worked out when it is first asked for.
 *
 * @returns the same result; what it already has stays, and one that somebody froze before stays as it is.
 * @example attach({ kind: "note" }, { length: () => 4 }).length; // 4
 */
export function attach<T extends object, Members extends object>(
  result: T,
  members: { readonly [Name in keyof Members]: () => Members[Name] },
): T & Readonly<Members> {
  for (const [name, make] of Object.entries<() => unknown>(members)) {
    if (Object.hasOwn(result, name) || !Object.isExtensible(result)) continue;
    let made: { readonly value: unknown } | undefined;
    Object.defineProperty(result, name, {
      get: () => {
        made ??= { value: make() };
        return made.value;
      },
    });
  }
  return result as T & Readonly<Members>;
}
