import { Marked, type Tokens } from "marked";
import { escapeHtml } from "../../../kernel-helpers/wording/index.js";
import { joined, type ShownCell } from "./shown-notebook.js";

type Attachments = NonNullable<ShownCell["attachments"]>;

/**
 * A markdown cell as HTML. HTML in it is shown as text; links lead only to the web, a mailbox or an anchor on the page;
 * a picture is shown only if the notebook contains it, because the page fetches nothing.
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
        const source = embeddedImage(href, attachments);
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

/** A picture as a data URL: from the text, or attached to the cell. */
function embeddedImage(href: string, attachments: Attachments): string | undefined {
  if (/^data:image\/(png|jpeg|gif|webp);base64,[A-Za-z0-9+/=]+$/.test(href)) return href;
  if (!href.startsWith("attachment:")) return undefined;
  const name = href.slice("attachment:".length);
  const kept = Object.hasOwn(attachments, name) ? attachments[name] : undefined;
  const [type, data] =
    Object.entries(kept ?? {}).find(([kind]) => /^image\/(png|jpeg|gif|webp)$/.test(kind)) ?? [];
  return type && `data:${type};base64,${escapeHtml(joined(data))}`;
}
