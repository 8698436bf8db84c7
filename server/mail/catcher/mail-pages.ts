import { escapeHtml } from '../escape-html.ts';
import type { CaughtMail, MailContent } from './caught-mail.ts';

const page = (title: string, body: string): string => `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1">
<title>${escapeHtml(title)}</title><link rel="stylesheet" href="/styles.css"><script src="/reload.js" defer></script></head>
<body>${body}</body></html>`;

const clock = (at: number): string => {
  const text = new Date(at).toISOString();
  return `<time datetime="${text}">${text.slice(0, 10)} ${text.slice(11, 19)} UTC</time>`;
};

const count = (mails: number): string => (mails === 1 ? 'One mail caught' : `${mails} mails caught`);

function listItem(mail: CaughtMail): string {
  const words = `<b>${escapeHtml(mail.subject)}</b><span>${clock(mail.receivedAt)} to ${escapeHtml(mail.to.join(', '))}</span>`;
  return `<li><a href="/mails/${mail.id}">${words}</a></li>`;
}

/** The list of caught mails, newest first. */
export function listPage(mails: readonly CaughtMail[]): string {
  const list =
    mails.length === 0
      ? '<div class="empty">No mail yet. An alarm’s first mail appears here a moment after it is raised.</div>'
      : `<ol>${mails.map(listItem).join('')}</ol>`;
  return page(
    'Caught mail',
    `<main data-reload><h1 aria-live="polite">${mails.length === 0 ? 'No mail caught yet' : count(mails.length)}</h1>
<p>Millrace’s mail on this machine ends here: nothing was sent to anybody.</p>${list}</main>`,
  );
}

const LINK = /https?:\/\/[^\s<>"]+/g;

const linked = (text: string): string =>
  escapeHtml(text).replaceAll(LINK, (address) => `<a href="${address}">${address}</a>`);

/** One mail: its words as text, and as its HTML in a frame that can run nothing. */
export function mailPage(mail: CaughtMail, content: MailContent): string {
  const frame =
    content.html === undefined
      ? ''
      : `<h2>As HTML</h2><iframe title="The mail as HTML" src="/mails/${mail.id}/html" sandbox="allow-popups allow-popups-to-escape-sandbox"></iframe>`;
  return page(
    mail.subject,
    `<main><p><a href="/">All caught mail</a></p><h1>${escapeHtml(mail.subject)}</h1>
<dl><dt>From</dt><dd>${escapeHtml(mail.from)}</dd><dt>To</dt><dd>${escapeHtml(mail.to.join(', '))}</dd>
<dt>Caught</dt><dd>${clock(mail.receivedAt)}</dd><dt>Message-ID</dt><dd>${escapeHtml(mail.messageId)}</dd></dl>
<h2>As text</h2><pre tabindex="0">${linked(content.text)}</pre>${frame}</main>`,
  );
}

/** Links of a mail open beside it. */
export const framedHtml = (html: string): string => `<base target="_blank">${html}`;

export const missingPage = (): string =>
  page(
    'Not found',
    '<main><h1>This mail is not here</h1><p>The oldest are dropped. <a href="/">All caught mail</a></p></main>',
  );

/** Keeps the list up to date without taking the page away from whoever reads it. */
export const RELOAD_SCRIPT = `
const main = document.querySelector('main[data-reload]');
if (main) setInterval(async () => {
  const answer = await fetch('/').catch(() => undefined);
  if (!answer?.ok) return;
  const fresh = new DOMParser().parseFromString(await answer.text(), 'text/html').querySelector('main');
  if (fresh && fresh.innerHTML !== main.innerHTML && !main.contains(document.activeElement)) main.innerHTML = fresh.innerHTML;
}, 2000);
`;
