import { once } from 'node:events';
import { mkdtemp, rm } from 'node:fs/promises';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createTransport } from 'nodemailer';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { createMailPageServer } from '#server/mail/catcher/mail-page-server.ts';
import { openMailStore } from '#server/mail/catcher/mail-store.ts';
import { createSmtpReceiver } from '#server/mail/catcher/smtp-receiver.ts';

const MAIL = {
  from: 'Millrace <millrace@localhost>',
  to: 'tech@larkmoor.example',
  subject: 'Did not prime: Tern Court 4 <urgent>',
  text: 'See http://localhost:4310/alarms/1 & look first',
  html: '<p>See <a href="http://localhost:4310/alarms/1">the alarm</a></p><script>window.top.hurt = 1</script>',
  messageId: '<one@millrace.example>',
};

describe('the mail catcher', () => {
  let folder: string;
  const closers: (() => unknown)[] = [];

  beforeEach(async () => {
    folder = await mkdtemp(join(tmpdir(), 'caught-'));
  });
  afterEach(async () => {
    for (const close of closers.splice(0)) await close();
    await rm(folder, { recursive: true });
  });

  async function start() {
    const store = await openMailStore(folder);
    const receiver = createSmtpReceiver(store, Date.now);
    const smtp = receiver.listen(0, '127.0.0.1');
    await once(smtp, 'listening');
    const pages = createMailPageServer(store).listen(0, '127.0.0.1');
    await once(pages, 'listening');
    closers.push(
      () => new Promise<void>((resolve) => receiver.close(() => resolve())),
      () => pages.close(),
    );
    const { port } = smtp.address() as AddressInfo;
    return {
      send: (mail = MAIL) => createTransport({ host: '127.0.0.1', port, ignoreTLS: true }).sendMail(mail),
      get: (path: string) => fetch(`http://127.0.0.1:${(pages.address() as AddressInfo).port}${path}`),
    };
  }

  it('takes a mail over SMTP and shows it, its HTML in a frame that can run nothing', async () => {
    const { send, get } = await start();

    const sent = await send();

    expect(sent.accepted).toEqual(['tech@larkmoor.example']);
    const [mail] = (await (await get('/mails.json')).json()) as { id: string; messageId: string }[];
    expect(mail?.messageId).toBe('<one@millrace.example>');
    const page = await (await get(`/mails/${mail?.id}`)).text();
    expect(page).toContain('Did not prime: Tern Court 4 &lt;urgent&gt;');
    expect(page).toContain('<a href="http://localhost:4310/alarms/1">');
    expect(page).toMatch(/<iframe [^>]*sandbox="allow-popups/);
    const framed = await get(`/mails/${mail?.id}/html`);
    expect(framed.headers.get('content-security-policy')).toMatch(/^default-src 'none'/);
  });

  it('still has its mails after a restart', async () => {
    await (await start()).send();
    for (const close of closers.splice(0)) await close();

    const { get } = await start();

    expect(await (await get('/mails.json')).json()).toHaveLength(1);
  });

  it('says what will appear while it is empty, and that a mail is not here', async () => {
    const { get } = await start();

    expect(await (await get('/')).text()).toContain('No mail caught yet');
    expect((await get('/mails/1700000000000-0001')).status).toBe(404);
    expect((await get('/mails/..%2f..%2fetc')).status).toBe(404);
  });
});
