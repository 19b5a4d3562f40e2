const entities: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
  $: "&#36;",
};

/**
 * Text as HTML that shows exactly that text, in an element or an attribute.
 *
 * The dollar sign is escaped too, because a notebook's page typesets what stands between two of them.
 *
 * @example escapeHtml("<b>"); // "&lt;b&gt;"
 */
export function escapeHtml(text: string): string {
  return text.replace(/[&<>"'$]/g, (sign) => entities[sign] ?? sign);
}
