import type { MailCause, MailSection } from './compose-alarm-mail.ts';
import { escapeHtml } from './escape-html.ts';
import { LIKELY_TITLES } from './likely-titles.ts';

const INK = '#1c2a33';
const QUIET = '#51626d';
const MARKS: Readonly<Record<string, string>> = { Urgent: '#a3221b', Soon: '#8a5300', Note: '#35586c' };

/** One alarm as a fragment of HTML. Styles stand in the elements: mail programs drop everything else. */
export function writeSectionHtml(section: MailSection): string {
  const mark = MARKS[section.priority] ?? INK;
  return [
    `<div style="border-left:4px solid ${mark};padding:0 0 0 16px;margin:0 0 28px">`,
    `<p style="margin:0;font-size:13px;font-weight:bold;color:${mark}">${escapeHtml(section.priority)}</p>`,
    `<h1 style="margin:2px 0 10px;font-size:21px;line-height:1.3;color:${INK}">${escapeHtml(section.title)}</h1>`,
    section.lead === undefined ? '' : `<p style="margin:0 0 10px"><strong>${escapeHtml(section.lead)}</strong></p>`,
    table(section.facts),
    `<p style="margin:12px 0">${escapeHtml(section.meaning)}</p>`,
    part('What speaks for it', section.evidence.length === 0 ? '' : table(section.evidence)),
    part(LIKELY_TITLES[section.likely.guess ? 'guess' : 'certain'], items('ol', section.likely.causes.map(causeItem))),
    part('Look at first', items('ol', section.look.map(lookItem))),
    part(section.cautionTitle, items('ul', section.cautions.map(escapeHtml))),
    `<p style="margin:18px 0 0"><a href="${escapeHtml(section.link)}" style="display:inline-block;padding:11px 18px;`,
    `background:${INK};color:#ffffff;text-decoration:none;border-radius:4px">Open the alarm</a></p>`,
    '</div>',
  ].join('');
}

const lookItem = ({ what, why }: { readonly what: string; readonly why: string }) =>
  `${escapeHtml(what)} <span style="color:${QUIET}">(${escapeHtml(why)})</span>`;

const causeItem = ({ name, check, reasons }: MailCause) =>
  [`<strong>${escapeHtml(name)}</strong>`, ...[...reasons, `tell by: ${check}`].map(quietLine)].join('');

const quietLine = (text: string) => `<br><span style="color:${QUIET}">${escapeHtml(text)}</span>`;

function table(rows: readonly { readonly name: string; readonly value: string }[]): string {
  const cells = rows.map(
    ({ name, value }) =>
      `<tr><th scope="row" style="text-align:left;font-weight:normal;color:${QUIET};padding:2px 14px 2px 0;` +
      `vertical-align:top">${escapeHtml(name)}</th><td style="padding:2px 0">${escapeHtml(value)}</td></tr>`,
  );
  return `<table style="border-collapse:collapse;font-size:15px">${cells.join('')}</table>`;
}

function items(tag: 'ol' | 'ul', lines: readonly string[]): string {
  if (lines.length === 0) return '';
  const list = lines.map((line) => `<li style="margin:4px 0">${line}</li>`).join('');
  return `<${tag} style="margin:4px 0;padding-left:22px">${list}</${tag}>`;
}

function part(title: string, body: string): string {
  return body === ''
    ? ''
    : `<h2 style="margin:14px 0 4px;font-size:15px;color:${INK}">${escapeHtml(title)}</h2>${body}`;
}
