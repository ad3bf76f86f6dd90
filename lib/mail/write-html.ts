import type { Letter } from './letter';
import { oneLine } from './write-text';

/** The sheet's colours by daylight; mail programs that darken a page do so by themselves. */
const PAPER = '#f2ede4';
const SHEET = '#fbf9f4';
const INK = '#1d2628';
const SOFT = '#556063';
const RULE = '#7d857f';
const RUDDLE = '#a03523';
const ON_RUDDLE = '#fdf8f4';

const SANS = "'Helvetica Neue',Helvetica,Arial,sans-serif";
const SERIF = "Georgia,'Times New Roman',serif";

/**
 * A letter as HTML: one small sheet with a double border, in tables and inline styles, which is all
 * that mail programs keep. It loads nothing from anywhere. Every text is escaped.
 */
export function writeHtml(letter: Letter): string {
  const { subject, name, paragraphs, action, reason } = letter;
  const text = (words: string) =>
    `<p style="margin:0 0 14px;font:16px/1.5 ${SERIF};color:${INK}">${escaped(words)}</p>`;
  return [
    '<!doctype html>',
    '<html lang="en-GB"><head><meta charset="utf-8">',
    '<meta name="viewport" content="width=device-width,initial-scale=1">',
    `<title>${escaped(subject)}</title></head>`,
    `<body style="margin:0;padding:24px 12px;background:${PAPER}">`,
    '<table role="presentation" width="100%" cellpadding="0" cellspacing="0" border="0"><tr><td align="center">',
    `<table role="presentation" width="100%" cellpadding="0" cellspacing="0" border="0" style="max-width:560px;background:${SHEET};border:1px solid ${RULE}"><tr><td style="padding:6px">`,
    `<table role="presentation" width="100%" cellpadding="0" cellspacing="0" border="0" style="border:2px solid ${INK}">`,
    `<tr><td align="left" style="padding:22px 24px 8px">`,
    `<h1 style="margin:0 0 16px;font:bold 22px/1.25 ${SERIF};color:${INK}">${escaped(subject)}</h1>`,
    ...(name === undefined ? [] : [text(`${name},`)]),
    ...paragraphs.map(text),
    ...(action === undefined ? [] : [button(action)]),
    '</td></tr>',
    `<tr><td align="left" style="padding:10px 24px;border-top:2px solid ${INK};font:13px/1.4 ${SANS};color:${SOFT}">`,
    `<strong style="color:${INK}">Surdwork</strong><br>${escaped(reason)}`,
    '</td></tr></table></td></tr></table></td></tr></table></body></html>',
  ].join('\n');
}

/** The address stands under the button as well, for whoever cannot press it. */
function button({ label, url }: { label: string; url: string }): string {
  const href = escaped(url);
  return [
    `<p style="margin:4px 0 10px"><a href="${href}" target="_blank" rel="noopener" style="display:inline-block;padding:10px 18px;background:${RUDDLE};border:1px solid ${RUDDLE};color:${ON_RUDDLE};font:bold 15px/1.3 ${SANS};text-decoration:none">${escaped(label)}</a></p>`,
    `<p style="margin:0 0 14px;font:13px/1.4 ${SANS};color:${SOFT};word-break:break-all">${href}</p>`,
  ].join('\n');
}

const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

function escaped(text: string): string {
  return oneLine(text).replace(/[&<>"']/g, (mark) => ENTITIES[mark] ?? '');
}
