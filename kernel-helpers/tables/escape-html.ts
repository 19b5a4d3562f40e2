const entities: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
  $: "&#36;",
};

// Control characters other than tab and line end, and marks that would turn round the text after them.
const acting = /(?![\t\n])\p{Cc}|[\u202a-\u202e\u2066-\u2069]/gu;

/**
 * Text as HTML that shows exactly that text, in an element or an attribute.
 *
 * @example escapeHtml("<b>"); // "&lt;b&gt;"
 */
export function escapeHtml(text: string): string {
  return text.replace(acting, " ").replace(/[&<>"']/g, (sign) => entities[sign] ?? sign);
}

/** Classes of a box in which a notebook's page leaves dollar signs alone, instead of typesetting what they enclose. */
export const untypeset = "tex2jax_ignore mathjax_ignore";
