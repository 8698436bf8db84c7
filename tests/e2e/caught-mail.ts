import { waitUntil } from '#server/bootstrap/process-table.mjs';

/** A mail that the catcher shows, with its words. */
export type Mail = {
  readonly id: string;
  readonly to: readonly string[];
  readonly subject: string;
  readonly messageId: string;
};
export type MailWords = Mail & { readonly text: string; readonly html: string };

/** What was caught so far, newest first; empty while the catcher is not there. */
export async function listMails(mailUrl: string): Promise<Mail[]> {
  const answer = await fetch(`${mailUrl}/mails.json`).catch(() => undefined);
  return answer?.ok === true ? ((await answer.json()) as Mail[]) : [];
}

/** Waits for a mail that fits, and opens it. */
export async function waitForMail(
  mailUrl: string,
  fits: (mail: Mail) => boolean,
  withinMs: number,
): Promise<MailWords> {
  let found: Mail | undefined;
  await waitUntil(async () => {
    found = (await listMails(mailUrl)).find(fits);
    return found !== undefined;
  }, withinMs);
  if (found === undefined) {
    const subjects = (await listMails(mailUrl)).map(({ to, subject }) => `${to.join(' ')}: ${subject}`);
    throw new Error(`No such mail within ${withinMs / 1000} s. Caught: ${JSON.stringify(subjects)}`);
  }
  return (await (await fetch(`${mailUrl}/mails/${found.id}.json`)).json()) as MailWords;
}

/** The link in a mail's text that opens its alarm. */
export function getAlarmLink({ text }: MailWords): string {
  const link = /https?:\/\/\S+\/alarms\/[0-9a-f-]{36}/.exec(text)?.[0];
  if (link === undefined) throw new Error(`This mail names no alarm:\n${text}`);
  return link;
}
