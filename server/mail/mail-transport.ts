import { createTransport } from 'nodemailer';
import type { ComposedMail } from './compose-alarm-mail.ts';

export type MailToSend = ComposedMail & { readonly address: string; readonly messageId: string };

/** Hands a mail to the mail server; rejects when the server did not take it. */
export type SendMail = (mail: MailToSend) => Promise<void>;

/** Together well under the lease of a claimed mail. */
const LIMITS = { connectionTimeout: 10_000, greetingTimeout: 10_000, socketTimeout: 20_000, dnsTimeout: 5_000 };

/** One connection a mail, with limits for every step: a mail server that hangs delays, it never blocks. */
export function createSmtpTransport(options: { readonly smtpUrl: string; readonly from: string }): SendMail {
  const transport = createTransport({
    url: options.smtpUrl,
    ...LIMITS,
    // Content comes from the outbox alone: never from a file or an address that a text happens to name.
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return async ({ address, subject, text, html, messageId }) => {
    await transport.sendMail({
      from: options.from,
      to: address,
      subject,
      text,
      html,
      messageId,
      // RFC 3834: no out-of-office answers, please.
      headers: { 'Auto-Submitted': 'auto-generated' },
    });
  };
}
