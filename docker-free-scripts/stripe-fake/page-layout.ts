/** The shell of the stand-in's pages: no script, nothing loaded, readable on a phone and in the dark. */
import { createHash } from 'node:crypto';

const ENTITIES: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

export const escapeHtml = (text: string) => text.replace(/[&<>"']/g, (char) => ENTITIES[char] ?? char);

export function money(minor: number, currency: string): string {
  const format = new Intl.NumberFormat('en-US', { style: 'currency', currency });
  const digits = format.resolvedOptions().maximumFractionDigits ?? 2;
  return format.format(minor / 10 ** digits);
}

const CSS = `
:root { color-scheme: light dark; --ground: #eef0f4; --sheet: #fff; --ink: #1c2230; --soft: #565e70;
  --line: #8b93a5; --act: #2c4a8f; --on-act: #fff; --wrong: #a3161f; --tag: #fdf3d0; --on-tag: #4b3a00; }
@media (prefers-color-scheme: dark) { :root { --ground: #12151c; --sheet: #1c212c; --ink: #eceff6;
  --soft: #aab2c4; --line: #6f788c; --act: #a9c1ff; --on-act: #10182c; --wrong: #ffa3a3; --tag: #3b3005; --on-tag: #ffe9a3; } }
* { box-sizing: border-box; }
body { margin: 0; background: var(--ground); color: var(--ink); font: 1rem/1.5 system-ui, sans-serif; }
main { max-width: 33rem; margin: 0 auto; padding: 1.25rem 1rem 3rem; }
.tag { background: var(--tag); color: var(--on-tag); padding: .6rem .9rem; border-radius: .4rem; margin: 0 0 1.25rem; }
.sheet { background: var(--sheet); border-radius: .6rem; padding: 1.25rem; }
h1 { font-size: 1.15rem; margin: 0 0 .25rem; }
.amount { font-size: 2rem; line-height: 1.2; font-variant-numeric: tabular-nums; margin: .25rem 0 1rem; font-weight: 600; }
.soft { color: var(--soft); }
fieldset { border: 0; padding: 0; margin: 0; } legend { padding: 0; font-weight: 600; }
.choice { display: flex; gap: .6rem; align-items: center; min-height: 3rem; }
.choice input { width: 1.25rem; height: 1.25rem; margin: 0; }
label { display: block; font-weight: 600; }
.choice label { flex: 1; padding: .6rem 0; }
.field { margin: 0 0 1rem; }
input[type=text] { width: 100%; min-height: 3rem; padding: .5rem .75rem; font: inherit; font-variant-numeric: tabular-nums;
  color: inherit; background: transparent; border: 1px solid var(--line); border-radius: .4rem; }
input[aria-invalid=true] { border: 2px solid var(--wrong); }
.wrong { color: var(--wrong); margin: .3rem 0 0; font-weight: 600; }
.summary { border: 2px solid var(--wrong); border-radius: .4rem; padding: .6rem .9rem; margin: 0 0 1rem; }
.summary p { margin: 0; } .hint { color: var(--soft); margin: .3rem 0 0; }
.pair { display: grid; grid-template-columns: 1fr 1fr; gap: 0 1rem; }
button, .button { display: block; width: 100%; min-height: 3rem; padding: .7rem 1rem; font: inherit; font-weight: 600; text-align: center;
  color: var(--on-act); background: var(--act); border: 0; border-radius: .4rem; cursor: pointer; text-decoration: none; }
.quiet { background: transparent; color: var(--act); border: 1px solid var(--line); margin-top: .75rem; }
:focus-visible { outline: 3px solid var(--act); outline-offset: 2px; }
form:has(#method-bank:checked) .card, form:not(:has(#method-bank:checked)) .bank { display: none; }
table { width: 100%; border-collapse: collapse; margin-top: .5rem; } caption { text-align: left; font-weight: 600; }
td { padding: .35rem 0; border-top: 1px solid color-mix(in srgb, var(--line) 40%, transparent); }
td:first-child { font-family: ui-monospace, monospace; white-space: nowrap; padding-right: 1rem; }
.below { margin-top: 1.5rem; }
@media (max-width: 24rem) { td:first-child { font-size: .875rem; } }
`;

const STYLE_HASH = createHash('sha256').update(CSS).digest('base64');

/** No form-action: a paid form is redirected to the shop, on another address. */
export const PAGE_HEADERS = {
  'content-type': 'text/html; charset=utf-8',
  'cache-control': 'no-store',
  'content-security-policy': `default-src 'none'; img-src data:; style-src 'sha256-${STYLE_HASH}'; base-uri 'none'; frame-ancestors 'none'`,
  'referrer-policy': 'no-referrer',
  'x-content-type-options': 'nosniff',
};

const TAG =
  'This page stands in for a card service, for demonstration and tests. No money moves. Never type a real card.';

/** @param content HTML; texts in it are escaped by whoever writes them */
export function page(title: string, content: string): string {
  return `<!doctype html><html lang="en"><head><meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1"><meta name="robots" content="noindex">
<link rel="icon" href="data:,"><title>${escapeHtml(title)} - Test card page (stand-in)</title><style>${CSS}</style></head>
<body><main><p class="tag"><strong>Test card page (stand-in).</strong> ${TAG}</p>${content}</main></body></html>`;
}
