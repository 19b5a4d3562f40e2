import { Marked, type Tokens } from "marked";
import { escapeHtml } from "../../../kernel-helpers/wording/index.js";
import { joined, type ShownCell } from "./shown-notebook.js";

type Attachments = NonNullable<ShownCell["attachments"]>;

/**
 * A markdown cell as HTML. Markup inside it is shown as text; a link goes only to the web, a mailbox or a place on
 * the page; a picture is shown only when the notebook carries it, for the page fetches nothing.
 */
export function markdownHtml(source: string, attachments: Attachments = {}): string {
  const marked = new Marked({
    gfm: true,
    renderer: {
      html: ({ text }: Tokens.HTML | Tokens.Tag) => escapeHtml(text),
      link({ href, tokens }: Tokens.Link) {
        const text = this.parser.parseInline(tokens);
        return isLink(href) ? `<a href="${escapeHtml(href)}" rel="noreferrer">${text}</a>` : text;
      },
      image({ href, text }: Tokens.Image) {
        const source = carried(href, attachments);
        return source
          ? `<img src="${source}" alt="${escapeHtml(text)}">`
          : `<em>${escapeHtml(text || href)}</em>`;
      },
    },
  });
  const html = marked.parse(source, { async: false });
  return html.replace(/<table>/g, '<div class="scroll"><table>').replace(/<\/table>/g, "</table></div>");
}

function isLink(href: string): boolean {
  return /^(https?:\/\/|mailto:|#)/i.test(href.trim());
}

/** A picture as data: written so in the text, or attached to the cell. */
function carried(href: string, attachments: Attachments): string | undefined {
  if (/^data:image\/(png|jpeg|gif|webp);base64,[A-Za-z0-9+/=]+$/.test(href)) return href;
  if (!href.startsWith("attachment:")) return undefined;
  const name = href.slice("attachment:".length);
  const kept = Object.hasOwn(attachments, name) ? attachments[name] : undefined;
  const [type, data] =
    Object.entries(kept ?? {}).find(([kind]) => /^image\/(png|jpeg|gif|webp)$/.test(kind)) ?? [];
  return type && `data:${type};base64,${escapeHtml(joined(data))}`;
}
