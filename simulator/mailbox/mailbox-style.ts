import { readFile } from 'node:fs/promises';

const packages = '@fontsource-variable';

/** The fonts that the style sheet names, by the file name in their address. */
export const fontFiles: Readonly<Record<string, string>> = {
  'text.woff2': `${packages}/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-normal.woff2`,
  'headings.woff2': `${packages}/fraunces/files/fraunces-latin-opsz-normal.woff2`,
};

/** Reads a font of the style sheet. */
export function readFont(file: string): Promise<Buffer> {
  return readFile(require.resolve(file));
}

/** The look of the mailbox: the application's colours and type, by day and with the lamps off. */
export const mailboxStyle = `
@font-face {
  font-family: 'Text';
  src: url('/fonts/text.woff2') format('woff2');
  font-weight: 200 800;
  font-display: swap;
}
@font-face {
  font-family: 'Headings';
  src: url('/fonts/headings.woff2') format('woff2');
  font-weight: 100 900;
  font-display: swap;
}
:root {
  color-scheme: light;
  --paper: #f6f0e4;
  --sheet: #fffbf3;
  --ink: #231c15;
  --ink-2: #5d5246;
  --rule: #dacfbb;
  --edge: #8d806d;
  --leek: #2b5d49;
  --leek-tint: #dbe8dc;
}
@media (prefers-color-scheme: dark) {
  :root {
    color-scheme: dark;
    --paper: #15120f;
    --sheet: #1f1a15;
    --ink: #f2e8d8;
    --ink-2: #b9ab96;
    --rule: #3b3228;
    --edge: #85775f;
    --leek: #93c9ac;
    --leek-tint: #22362d;
  }
}
* {
  box-sizing: border-box;
}
body {
  max-width: 60rem;
  margin: 0 auto;
  padding: 1.25rem 1rem 3rem;
  background: var(--paper);
  color: var(--ink);
  font: 400 1rem/1.5 'Text', system-ui, sans-serif;
  font-variant-numeric: tabular-nums;
}
h1,
h2 {
  margin: 0;
  font-family: 'Headings', Georgia, serif;
  font-weight: 560;
  line-height: 1.2;
  overflow-wrap: anywhere;
}
h1 {
  font-size: 1.75rem;
}
h2 {
  margin: 1.75rem 0 0.5rem;
  font-size: 1.25rem;
}
p {
  margin: 0.4rem 0;
}
a {
  color: var(--leek);
}
:focus-visible {
  outline: 3px solid var(--leek);
  outline-offset: 2px;
}
form {
  display: flex;
  flex-wrap: wrap;
  align-items: end;
  gap: 0.75rem;
  margin: 1rem 0;
}
label {
  display: grid;
  flex: 1 1 12rem;
  font-size: 0.9rem;
  color: var(--ink-2);
}
input,
button {
  min-height: 3rem;
  padding: 0 0.75rem;
  border: 1px solid var(--edge);
  border-radius: 0.6rem;
  background: var(--sheet);
  color: var(--ink);
  font: inherit;
}
button {
  padding: 0 1.25rem;
  border-color: var(--leek);
  background: var(--leek);
  color: var(--paper);
  font-weight: 650;
}
form a {
  padding: 0.75rem 0;
}
.count,
header p,
dt {
  color: var(--ink-2);
}
.mails {
  margin: 0;
  padding: 0;
  list-style: none;
  border: 1px solid var(--rule);
  border-radius: 0.9rem;
  background: var(--sheet);
  overflow: hidden;
}
.mails li + li {
  border-top: 1px solid var(--rule);
}
.mails a,
.here {
  display: grid;
  grid-template-columns: 1fr auto;
  gap: 0 1rem;
  margin: 0;
  padding: 0.7rem 1rem;
  color: var(--ink);
  text-decoration: none;
  overflow-wrap: anywhere;
}
.mails a:hover b {
  text-decoration: underline;
}
.mails b {
  grid-column: 1;
}
.mails span,
.mails time {
  color: var(--ink-2);
  font-size: 0.9rem;
}
.mails .thread {
  justify-self: end;
  align-self: center;
  padding: 0 0.6rem;
  border-radius: 1rem;
  background: var(--leek-tint);
  color: var(--leek);
  white-space: nowrap;
}
.mails span:not(.thread) {
  grid-column: 1;
}
.mails time {
  grid-column: 2;
  white-space: nowrap;
}
.here {
  background: var(--leek-tint);
}
dl {
  display: grid;
  grid-template-columns: max-content 1fr;
  gap: 0.1rem 1rem;
  margin: 0.75rem 0;
}
dd {
  margin: 0;
  overflow-wrap: anywhere;
}
nav {
  display: flex;
  gap: 0.25rem;
  margin: 1rem 0 0;
  border-bottom: 1px solid var(--rule);
}
nav a {
  padding: 0.75rem 0.9rem;
  text-decoration: none;
}
nav [aria-current] {
  border-bottom: 3px solid var(--leek);
  color: var(--ink);
  font-weight: 650;
}
pre {
  margin: 0;
  padding: 1rem;
  border: 1px solid var(--rule);
  border-radius: 0.9rem;
  background: var(--sheet);
  font: inherit;
  white-space: pre-wrap;
  overflow-wrap: anywhere;
}
pre[tabindex] {
  font: 0.85rem/1.45 ui-monospace, monospace;
}
nav + main {
  margin-top: 1rem;
}
iframe {
  display: block;
  width: 100%;
  height: 70vh;
  border: 1px solid var(--rule);
  border-radius: 0.9rem;
  /* Mails are written for white paper. */
  background: #fff;
  color-scheme: light;
}
@media (max-width: 36rem) {
  .mails a,
  .here {
    grid-template-columns: 1fr;
  }
  .mails time,
  .mails .thread {
    grid-column: 1;
    justify-self: start;
  }
}
`;
