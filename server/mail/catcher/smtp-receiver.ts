import type { Readable } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import { SMTPServer } from 'smtp-server';
import type { MailStore } from './mail-store.ts';

const MOST_BYTES = 5 * 1024 * 1024;

/** A real SMTP server on loopback that takes every mail and delivers none. */
export function createSmtpReceiver(store: Pick<MailStore, 'add'>, now: () => number): SMTPServer {
  return new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    banner: 'Millrace mail catcher: nothing leaves this machine',
    size: MOST_BYTES,
    // Whatever name and password a sender shows: this is a fake of somebody's mail server.
    onAuth: (_auth, _session, callback) => callback(null, { user: 'anybody' }),
    onData: (stream, session, callback) => {
      const recipients = session.envelope.rcptTo.map(({ address }) => address);
      receive(store, stream, now(), recipients).then(
        () => callback(),
        (error: unknown) => callback(error instanceof Error ? error : new Error(String(error))),
      );
    },
  });
}

async function receive(
  store: Pick<MailStore, 'add'>,
  stream: Readable & { readonly sizeExceeded?: boolean },
  receivedAt: number,
  recipients: readonly string[],
): Promise<void> {
  const source = await buffer(stream);
  if (stream.sizeExceeded) throw Object.assign(new Error('The mail is larger than 5 MiB'), { responseCode: 552 });
  await store.add(source, receivedAt, recipients);
}
