import { createServer, type Server, type ServerResponse } from 'node:http';
import { MAIL_PAGE_STYLES } from './mail-page-styles.data.ts';
import { framedHtml, listPage, mailPage, missingPage, RELOAD_SCRIPT } from './mail-pages.ts';
import type { MailStore } from './mail-store.ts';

const PAGE_POLICY =
  "default-src 'none'; style-src 'self'; script-src 'self'; connect-src 'self'; frame-src 'self'; base-uri 'none'";
/** A mail's own HTML: its inline styles, nothing else. */
const MAIL_POLICY = "default-src 'none'; style-src 'unsafe-inline'; img-src data:";

type Answer = { readonly status: number; readonly type: string; readonly body: string; readonly policy?: string };

const html = (body: string, status = 200): Answer => ({ status, type: 'text/html', body });

/** What the page server answers to a path. */
export async function answerMailPage(store: Pick<MailStore, 'list' | 'find' | 'read'>, path: string): Promise<Answer> {
  if (path === '/') return html(listPage(store.list()));
  if (path === '/styles.css') return { status: 200, type: 'text/css', body: MAIL_PAGE_STYLES };
  if (path === '/reload.js') return { status: 200, type: 'text/javascript', body: RELOAD_SCRIPT };
  if (path === '/mails.json') return { status: 200, type: 'application/json', body: JSON.stringify(store.list()) };
  const [, id = '', form = ''] = /^\/mails\/(\d{13}-\d{4})(\/html|\.json)?$/.exec(path) ?? [];
  const mail = store.find(id);
  const content = await store.read(id);
  if (mail === undefined || content === undefined) return html(missingPage(), 404);
  if (form === '.json') {
    return { status: 200, type: 'application/json', body: JSON.stringify({ ...mail, ...content }) };
  }
  if (form === '/html') return { ...html(framedHtml(content.html ?? '')), policy: MAIL_POLICY };
  return html(mailPage(mail, content));
}

function send(response: ServerResponse, { status, type, body, policy = PAGE_POLICY }: Answer): void {
  response.writeHead(status, {
    'Content-Type': `${type}; charset=utf-8`,
    'Content-Security-Policy': policy,
    'X-Content-Type-Options': 'nosniff',
    'Cache-Control': 'no-store',
  });
  response.end(body);
}

/** The page to read what was caught. */
export function createMailPageServer(store: Pick<MailStore, 'list' | 'find' | 'read'>): Server {
  return createServer((request, response) => {
    const { pathname } = new URL(request.url ?? '/', 'http://localhost');
    answerMailPage(store, pathname).then(
      (answer) => send(response, answer),
      () => send(response, { status: 500, type: 'text/plain', body: 'The mail cannot be read.' }),
    );
  });
}
