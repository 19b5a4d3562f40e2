const entities: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
};

// Control characters other than tab and line end, and marks that reverse the text after them.
const unsafe = /(?![\t\n])\p{Cc}|[\u202a-\u202e\u2066-\u2069]/gu;

/**
 * Text as HTML that shows exactly that text, in an element or an attribute.
 *
 * @example escapeHtml("<b>"); // "&lt;b&gt;"
 */
export function escapeHtml(text: string): string {
  return text.replace(unsafe, " ").replace(/[&<>"']/g, (sign) => entities[sign] ?? sign);
}

/** Classes of a box whose dollar signs a notebook's page does not read as TeX. */
export const untypeset = "tex2jax_ignore mathjax_ignore";
