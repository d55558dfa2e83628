import { escapeHtml } from './escape-html';

/** A picture of a section, said in words too. */
export interface SectionPicture {
  readonly cid: string;
  /** For who doesn't see it. */
  readonly alt: string;
  /** Under it: what its left and right ends are. */
  readonly ends: readonly [left: string, right: string];
  /** Its numbers and colours. */
  readonly note: string;
}

/** One thing that a mail tells. */
export interface MailSection {
  readonly heading: string;
  /** The first is said plainly, the others quieter. */
  readonly lines: readonly string[];
  readonly items?: readonly string[];
  readonly caution?: string | null;
  readonly picture?: SectionPicture | null;
  readonly links?: readonly { readonly text: string; readonly url: string }[];
}

/** A mail before it is laid out. */
export interface MailPlan {
  /** What mail programs show beside the subject. */
  readonly preview: string;
  readonly opening: string | null;
  readonly sections: readonly MailSection[];
  readonly footer: MailFooter;
}

/** Why the mail came, and how not to get it. */
export interface MailFooter {
  readonly reason: string;
  readonly choicesUrl: string;
  /** "Stop these mails", as it is true of this kind. */
  readonly stopText: string;
  readonly stopUrl: string;
}

/**
 * A mail in plain text.
 *
 * @param plan - What it says.
 * @returns Text with a signature line before the footer.
 */
export function plainText({ opening, sections, footer }: MailPlan): string {
  const told = sections.map(({ heading, lines, items = [], caution = null, links = [] }) =>
    paragraphs([
      heading,
      ...lines,
      items.map((item) => `- ${item}`).join('\n'),
      caution,
      links.map(({ text, url }) => `${text}: ${url}`).join('\n'),
    ]),
  );
  const body = paragraphs([opening, told.join('\n\n\n')]);
  return `${body}\n\n-- \n${footer.reason}\nChoose your mails: ${footer.choicesUrl}\n${footer.stopText}: ${footer.stopUrl}\n`;
}

/**
 * A mail in HTML that follows the reader's light or dark view.
 *
 * @param plan - What it says.
 * @returns A document that loads nothing.
 */
export function htmlPage({ preview, opening, sections, footer }: MailPlan): string {
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark"><meta name="supported-color-schemes" content="light dark">
<style>${style}</style></head>
<body class="page"><div class="preview">${escapeHtml(preview)}</div><main>
${opening === null ? '' : `<p class="opening">${escapeHtml(opening)}</p>`}
${sections.map(sectionHtml).join('\n')}
<footer><p>${escapeHtml(footer.reason)}</p>
<p><a href="${escapeHtml(footer.choicesUrl)}">Choose your mails</a> · <a href="${escapeHtml(footer.stopUrl)}">${escapeHtml(footer.stopText)}</a></p></footer>
</main></body></html>`;
}

const style = `
:root { color-scheme: light dark; }
.page { margin: 0; padding: 24px 16px; background: #f6f0e4; color: #231c15; font: 16px/1.5 system-ui, -apple-system, "Segoe UI", sans-serif; }
.preview { display: none; max-height: 0; overflow: hidden; }
main { max-width: 560px; margin: 0 auto; }
section { margin: 0 0 16px; padding: 20px 20px 10px; border: 1px solid #dacfbb; border-radius: 12px; background: #fffbf3; }
h1 { margin: 0 0 8px; font: 600 21px/1.25 Georgia, "Times New Roman", serif; }
p, ul { margin: 0 0 10px; }
ul { padding-left: 20px; }
.opening { font-size: 17px; }
.quiet, footer, .ends { color: #5d5246; }
.caution { padding: 10px 12px; border-left: 4px solid #eba921; background: #ffe7ae; color: #231c15; font-size: 15px; }
.chart { display: block; width: 100%; height: auto; margin: 14px 0 2px; }
.ends { width: 100%; margin: 0 0 14px; border-collapse: collapse; font-size: 13px; }
.ends td { padding: 0; }
tr td + td { text-align: right; }
.links { margin: 6px 0 0; }
.links a { display: inline-block; margin: 0 16px 0 0; padding: 11px 0; font-weight: 600; }
a { color: #2b5d49; }
footer { padding: 4px 4px 0; font-size: 14px; }
@media (prefers-color-scheme: dark) {
  .page { background: #15120f; color: #f2e8d8; }
  section { background: #1f1a15; border-color: #3b3228; }
  .quiet, footer, .ends { color: #b9ab96; }
  .caution { background: #4a3a17; border-left-color: #ffc65a; color: #f2e8d8; }
  a { color: #93c9ac; }
}`;

function sectionHtml({
  heading,
  lines,
  items = [],
  caution = null,
  picture = null,
  links = [],
}: MailSection): string {
  const [first = '', ...rest] = lines;
  return `<section><h1>${escapeHtml(heading)}</h1>
${first === '' ? '' : `<p>${escapeHtml(first)}</p>`}
${picture === null ? '' : pictureHtml(picture)}
${rest.map((line) => `<p class="quiet">${escapeHtml(line)}</p>`).join('\n')}
${items.length === 0 ? '' : `<ul>${items.map((item) => `<li>${escapeHtml(item)}</li>`).join('')}</ul>`}
${caution === null ? '' : `<p class="caution">${escapeHtml(caution)}</p>`}
${links.length === 0 ? '' : `<p class="links">${links.map(({ text, url }) => `<a href="${escapeHtml(url)}">${escapeHtml(text)}</a>`).join(' ')}</p>`}
</section>`;
}

function pictureHtml({ cid, alt, ends: [left, right], note }: SectionPicture): string {
  return `<img class="chart" src="cid:${escapeHtml(cid)}" width="520" height="150" alt="${escapeHtml(alt)}">
<table class="ends" role="presentation"><tr><td>${escapeHtml(left)}</td><td>${escapeHtml(right)}</td></tr><tr><td colspan="2">${escapeHtml(note)}</td></tr></table>`;
}

function paragraphs(parts: readonly (string | null)[]): string {
  return parts.filter((part) => part !== null && part !== '').join('\n\n');
}
