import { once } from 'node:events';
import { join } from 'node:path';
import { runProgram } from '#server/run-program.ts';
import { createMailPageServer } from './catcher/mail-page-server.ts';
import { openMailStore } from './catcher/mail-store.ts';
import { createSmtpReceiver } from './catcher/smtp-receiver.ts';

/** The demo's mail server: takes every mail over real SMTP, keeps it, and has a page to read it. */
await runProgram('mail-catcher', async ({ env, log, progress, atEnd }) => {
  const { smtpPort, pagePort } = env.mailCatcher;
  const store = await openMailStore(join(env.dataFolder, 'mail'));

  const receiver = createSmtpReceiver(store, Date.now);
  receiver.on('error', (err) => log.warn({ err }, 'an SMTP connection failed'));
  const smtp = receiver.listen(smtpPort, '127.0.0.1');
  await once(smtp, 'listening');
  atEnd(() => new Promise<void>((resolve) => receiver.close(() => resolve())));

  const pages = createMailPageServer(store);
  pages.listen(pagePort, '127.0.0.1');
  await once(pages, 'listening');
  atEnd(() => {
    pages.closeAllConnections();
    pages.close();
  });
  progress(`Catching mail on 127.0.0.1:${smtpPort}, to read at http://localhost:${pagePort}`);
});
