// Control characters and bidirectional marks, which could erase a terminal line or show a number backwards.
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

/** Text as one safe terminal line: control characters become spaces. */
export function oneLine(text: string): string {
  return text.replace(unsafe, " ").trim();
}

/** Width of a text in terminal columns: two for wide characters and emoji, none for combining marks. */
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

/** Text cut to at most this number of terminal columns, with an ellipsis if shortened. */
export function truncated(text: string, columns: number): string {
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
