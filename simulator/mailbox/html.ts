/** Text that is HTML already. Only {@link html} makes it. */
export class Html {
  /** @param text - Markup. */
  constructor(readonly text: string) {}
}

/** What may stand in a template: text, which is escaped, or HTML, or several of it. */
export type HtmlPart = string | number | Html | null | readonly Html[];

/** A template of HTML in which everything put in is escaped unless it is HTML itself; `null` leaves nothing. */
export function html(literals: TemplateStringsArray, ...parts: readonly HtmlPart[]): Html {
  return new Html(String.raw({ raw: literals }, ...parts.map(textOf)));
}

function textOf(part: HtmlPart): string {
  if (part === null) return '';
  if (part instanceof Html) return part.text;
  if (typeof part === 'string' || typeof part === 'number') return escaped(String(part));
  return part.map(textOf).join('');
}

function escaped(text: string): string {
  return text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
    .replaceAll("'", '&#39;');
}
