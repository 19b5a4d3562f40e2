/** The strings of a source text that a person can see, with the line of each. */
export function shownStrings(
  source: string,
  path: string,
): readonly { readonly line: number; readonly text: string }[];
