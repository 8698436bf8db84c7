import { mkdir, open, readdir, readFile, rename, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { type AddressObject, type ParsedMail, simpleParser } from 'mailparser';
import type { CaughtMail, MailContent } from './caught-mail.ts';

/** The catcher is for looking, not for keeping: the oldest go. */
const MOST_MAILS = 500;
const NAME = /^(\d{13}-\d{4})\.eml$/;

export type MailStore = {
  /** Keeps a mail on disk, then answers what it is. Its sender is told "accepted" only after that. */
  readonly add: (source: Buffer, receivedAt: number, recipients: readonly string[]) => Promise<CaughtMail>;
  /** Newest first. */
  readonly list: () => readonly CaughtMail[];
  readonly find: (id: string) => CaughtMail | undefined;
  readonly read: (id: string) => Promise<MailContent | undefined>;
};

const addressesOf = (field: AddressObject | AddressObject[] | undefined): string[] =>
  [field ?? []].flat().flatMap((list) => list.value.map(({ address }) => address ?? ''));

function describe(id: string, parsed: ParsedMail, recipients: readonly string[]): CaughtMail {
  return {
    id,
    receivedAt: Number(id.slice(0, 13)),
    from: parsed.from?.text ?? '',
    to: recipients.length > 0 ? recipients : addressesOf(parsed.to),
    subject: parsed.subject ?? '(no subject)',
    messageId: parsed.messageId ?? '',
  };
}

/** Opens the folder of caught mails; what lies there from before is listed again. */
export async function openMailStore(folder: string): Promise<MailStore> {
  await mkdir(folder, { recursive: true });
  const mails = new Map<string, CaughtMail>();
  const pathOf = (id: string): string => join(folder, `${id}.eml`);
  for (const name of (await readdir(folder)).sort()) {
    const id = NAME.exec(name)?.[1];
    if (id !== undefined) mails.set(id, describe(id, await simpleParser(await readFile(pathOf(id))), []));
  }
  let count = 0;

  const newId = (receivedAt: number): string => {
    count = (count + 1) % 10_000;
    return `${String(receivedAt).padStart(13, '0')}-${String(count).padStart(4, '0')}`;
  };
  const forgetOldest = async (): Promise<void> => {
    for (const id of [...mails.keys()].slice(0, Math.max(0, mails.size - MOST_MAILS))) {
      mails.delete(id);
      await rm(pathOf(id), { force: true });
    }
  };

  return {
    add: async (source, receivedAt, recipients) => {
      const mail = describe(newId(receivedAt), await simpleParser(source), recipients);
      await writeDurably(pathOf(mail.id), source);
      mails.set(mail.id, mail);
      await forgetOldest();
      return mail;
    },
    list: () => [...mails.values()].reverse(),
    find: (id) => mails.get(id),
    read: async (id) => {
      if (!mails.has(id)) return undefined;
      const parsed = await simpleParser(await readFile(pathOf(id)));
      return { text: parsed.text ?? '', html: parsed.html === false ? undefined : parsed.html };
    },
  };
}

async function writeDurably(path: string, source: Buffer): Promise<void> {
  const file = await open(`${path}.part`, 'w', 0o600);
  try {
    await file.writeFile(source);
    await file.sync();
  } finally {
    await file.close();
  }
  await rename(`${path}.part`, path);
}
