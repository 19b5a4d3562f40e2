const resets = /^(?:exports\.[\w$]+ = )+void 0;$/gm;

/** Names that compiled code declares: the compiler first sets all of them to undefined, in one chain. */
export function redeclaredNames(code: string): readonly string[] {
  const chains = code.match(resets) ?? [];
  return chains.flatMap((chain) => [...chain.matchAll(/exports\.([\w$]+)/g)].map((found) => found[1] ?? ""));
}
