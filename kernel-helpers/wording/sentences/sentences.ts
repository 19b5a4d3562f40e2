/**
 * Words as a sentence begins: with a capital. A name of the analyst's own keeps its letters, and is led in by
 * "The value of".
 *
 * @param names - names that are written as they are: states, columns, parameters.
 * @example capitalizeSentence("owed falls to 0 EUR", ["owed"]); // "The value of owed falls to 0 EUR"
 */
export function capitalizeSentence(words: string, names: readonly string[] = []): string {
  const [first = ""] = words.split(/[\s,;:.]/u, 1);
  if (names.includes(first)) return /^\p{Ll}/u.test(first) ? `The value of ${words}` : words;
  return words.replace(/^\p{Ll}/u, (letter) => letter.toUpperCase());
}

/**
 * Sentences one after the other, each with its full stop and none with two. Empty ones are left out.
 *
 * @example joinSentences("Draw down at hour 138", "The stock lasts."); // "Draw down at hour 138. The stock lasts."
 */
export function joinSentences(...sentences: readonly (string | undefined)[]): string {
  return sentences
    .map((sentence) => sentence?.trim().replace(/\.\.$/u, ".") ?? "")
    .filter((sentence) => sentence !== "")
    .map((sentence) => (/[.!?…:]["”)]?$/u.test(sentence) ? sentence : `${sentence}.`))
    .join(" ");
}
