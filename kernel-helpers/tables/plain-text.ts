// Control characters, and the marks that reorder the text around them: they could blank a terminal's line or
// show a number backwards.
const unsafe = /[\p{Cc}\u200e\u200f\u061c\u202a-\u202e\u2066-\u2069\u2028\u2029]+/gu;
const wide =
  /\p{Script=Han}|\p{Script=Hiragana}|\p{Script=Katakana}|\p{Script=Hangul}|\p{Emoji_Presentation}|\ufe0f|[\uff01-\uff60\uffe0-\uffe6\u3000-\u303e]/u;
const unseen = /^[\p{Mn}\p{Me}\p{Cf}]+$/u;

let segmenter: Intl.Segmenter | undefined;

/** The signs of a text, as a reader counts them; made when first asked for, because that takes milliseconds. */
function signsOf(text: string): Intl.Segments {
  segmenter ??= new Intl.Segmenter("en", { granularity: "grapheme" });
  return segmenter.segment(text);
}

/** Text from a client's file made harmless for one line of a terminal: whatever acts on it becomes a space. */
export function oneLine(text: string): string {
  return text.replace(unsafe, " ").trim();
}

/** Columns that a text takes in a terminal: two for wide signs and pictures, none for combining marks. */
export function displayWidth(text: string): number {
  // Plain Latin text, the usual case, needs no segmenting.
  if (/^[\x20-\x7e]*$/.test(text)) return text.length;
  let width = 0;
  for (const { segment } of signsOf(text)) {
    if (unseen.test(segment)) continue;
    width += wide.test(segment) ? 2 : 1;
  }
  return width;
}

/** Text cut to at most so many terminal columns, with an ellipsis where something is missing. */
export function shortened(text: string, columns: number): string {
  if (displayWidth(text) <= columns) return text;
  let kept = "";
  let width = 1;
  for (const { segment } of signsOf(text)) {
    width += displayWidth(segment);
    if (width > columns) break;
    kept += segment;
  }
  return `${kept}…`;
}
