/**
 * Words in a row, as a sentence has them.
 *
 * @param last - stands before the last one.
 * @example list(["a", "b", "c"]); // "a, b and c"
 */
export function list(words: readonly string[], last: "and" | "or" = "and"): string {
  if (words.length < 2) return words[0] ?? "none";
  return `${words.slice(0, -1).join(", ")} ${last} ${words[words.length - 1]}`;
}
