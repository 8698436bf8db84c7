import { once } from 'node:events';
import type { AddressInfo } from 'node:net';
import { simpleParser } from 'mailparser';
import type pg from 'pg';
import pino from 'pino';
import { SMTPServer } from 'smtp-server';
import { afterEach, describe, expect, it } from 'vitest';
import { newId } from '#server/db/new-id.ts';
import { createSmtpTransport } from '#server/mail/mail-transport.ts';
import { createOutboxSender, type OutboxSender } from '#server/mail/outbox-sender.ts';
import { makeTestCompany, type TestCompany } from '#tests/support/test-company.ts';
import { addAlarm } from '#tests/support/test-history.ts';
import { openFreshPools } from '#tests/support/test-pools.ts';

// The whole outbox and every alarm are worked on here: nothing of other tests may lie in it.
const { machine } = await openFreshPools();

type Mail = {
  readonly to: string;
  readonly subject: string;
  readonly messageId: string;
  readonly text: string;
  readonly html: string;
};

/** A real SMTP server; `refuse` answers a recipient with an error of that code. */
async function startSmtp(port = 0, refuse?: number) {
  const mails: Mail[] = [];
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onRcptTo: (_address, _session, done) =>
      refuse === undefined ? done() : done(Object.assign(new Error('no such mailbox'), { responseCode: refuse })),
    onData: (stream, _session, done) => {
      simpleParser(stream).then((mail) => {
        const to = [mail.to].flat()[0]?.text ?? '';
        const { subject = '', messageId = '', text = '', html } = mail;
        mails.push({ to, subject, messageId, text, html: html || '' });
        done();
      }, done);
    },
  });
  server.on('error', () => undefined);
  await once(server.listen(port, '127.0.0.1'), 'listening');
  const stop = () => new Promise<void>((resolve) => server.close(() => resolve()));
  return { mails, stop, port: (server.server.address() as AddressInfo).port };
}

const enders: (() => Promise<void>)[] = [];
afterEach(async () => {
  for (const end of enders.splice(0).reverse()) await end();
});

let clock = Date.now();
function startSender(port: number): OutboxSender {
  const send = createSmtpTransport({ smtpUrl: `smtp://127.0.0.1:${port}`, from: 'Millrace <millrace@watch.example>' });
  const sender = createOutboxSender({
    pool: machine,
    send,
    now: () => clock,
    log: pino({ level: 'silent' }),
    pollMs: 20,
  });
  sender.start();
  enders.push(sender.stop);
  return sender;
}

/** The open alarm that all mails of a company tell of. */
const opened = new Map<string, Promise<string>>();
function alarmOf({ companyId, pumps }: TestCompany): Promise<string> {
  const known = opened.get(companyId) ?? openAlarm(pumps[0]!.pumpId);
  opened.set(companyId, known);
  return known;
}
async function openAlarm(pumpId: string): Promise<string> {
  const id = await addAlarm(machine, pumpId, { from: new Date(clock) });
  await machine.query('delete from outbox_mails where alarm_id = $1', [id]);
  return id;
}

/** Puts a mail into the outbox; the address is of this test's own. */
async function enqueue(company: TestCompany, change: { dueAt?: number; to?: string; part?: string } = {}) {
  const alarmId = await alarmOf(company);
  const id = newId();
  const { dueAt = clock, to = company.technician.email, part = 'Did not prime' } = change;
  await machine.query(
    `insert into outbox_mails (id, company_id, alarm_id, transition, recipient_user_id, to_address, subject, text, html, message_id, due_at)
     values ($1::uuid, $2, $3, 'raised ' || $1, $4, $5, $6, $7, $8, $9, $10)`,
    [
      id,
      company.companyId,
      alarmId,
      company.technician.userId,
      to,
      `Urgent: ${part}`,
      `text of ${part}`,
      `<p>${part}</p>`,
      `<${id}@watch.example>`,
      new Date(dueAt),
    ],
  );
  return id;
}
const row = async (id: string) =>
  (
    await (machine as pg.Pool).query(
      'select sent_at, failed_at, attempts, last_error, leased_until from outbox_mails where id = $1',
      [id],
    )
  ).rows[0];

describe('the outbox', () => {
  it('is sent over SMTP as text and HTML, once, under the Message-ID it was given', async () => {
    const smtp = await startSmtp();
    enders.push(smtp.stop);
    const company = await makeTestCompany(machine);
    const id = await enqueue(company);
    startSender(smtp.port);
    await expect.poll(async () => (await row(id)).sent_at).not.toBeNull();
    const mine = smtp.mails.filter(({ to }) => to === company.technician.email);
    expect(mine.length).toBe(1);
    expect(mine[0]).toMatchObject({ subject: 'Urgent: Did not prime', messageId: `<${id}@watch.example>` });
    expect(mine[0]!.text).toContain('text of Did not prime');
    expect(mine[0]!.html).toContain('<p>Did not prime</p>');
    expect(mine[0]!.text).toContain('Millrace only watches');
  });

  it('gathers what leaves at one instant to one person in one mail', async () => {
    const smtp = await startSmtp();
    enders.push(smtp.stop);
    const company = await makeTestCompany(machine);
    const first = await enqueue(company, { part: 'Did not prime' });
    const second = await enqueue(company, { part: 'Stands still' });
    await enqueue(company, { part: 'Another time', dueAt: clock - 1 });
    startSender(smtp.port);
    await expect.poll(async () => (await row(second)).sent_at).not.toBeNull();
    await expect.poll(() => smtp.mails.filter(({ to }) => to === company.technician.email).length).toBe(2);
    const gathered = smtp.mails.find(({ messageId }) => messageId === `<${first}@watch.example>`);
    expect(gathered!.subject).toBe('2 alarms: Urgent: Did not prime');
    expect(gathered!.text).toContain('text of Stands still');
  });

  it('waits for a mail server that is dead, and is sent when it is back', async () => {
    const probe = await startSmtp();
    await probe.stop();
    const company = await makeTestCompany(machine);
    const id = await enqueue(company);
    startSender(probe.port);
    await expect.poll(async () => (await row(id)).last_error).toMatch(/ECONNREFUSED/);
    expect(await row(id)).toMatchObject({ sent_at: null, failed_at: null, attempts: 1 });
    const smtp = await startSmtp(probe.port);
    enders.push(smtp.stop);
    clock += 2_000;
    await expect.poll(async () => (await row(id)).sent_at).not.toBeNull();
    expect(smtp.mails.filter(({ to }) => to === company.technician.email).length).toBe(1);
    expect(await row(id)).toMatchObject({ attempts: 2, last_error: null });
  });

  it('is sent again, as the same mail, where a worker died before it noted that it was sent', async () => {
    const smtp = await startSmtp();
    enders.push(smtp.stop);
    const company = await makeTestCompany(machine);
    const id = await enqueue(company);
    // A worker took the lease, the server took the mail, and the worker died.
    await machine.query(`update outbox_mails set attempts = 1, leased_until = $2 where id = $1`, [
      id,
      new Date(clock + 60_000),
    ]);
    startSender(smtp.port);
    const other = await enqueue(company, { part: 'Later', dueAt: clock - 5 });
    await expect.poll(async () => (await row(other)).sent_at).not.toBeNull();
    expect((await row(id)).sent_at).toBeNull();
    clock += 61_000;
    await expect.poll(async () => (await row(id)).sent_at).not.toBeNull();
    expect(smtp.mails.filter(({ messageId }) => messageId === `<${id}@watch.example>`).length).toBe(1);
  });

  it('gives up an address that the mail server refuses for good, after some tries, and says why', async () => {
    const smtp = await startSmtp(0, 550);
    enders.push(smtp.stop);
    const company = await makeTestCompany(machine);
    const id = await enqueue(company);
    startSender(smtp.port);
    await expect
      .poll(async () => {
        clock += 61_000;
        return (await row(id)).failed_at;
      })
      .not.toBeNull();
    expect((await row(id)).last_error).toMatch(/no such mailbox/);
    expect(await row(id)).toMatchObject({ attempts: 5, sent_at: null });
  });

  it('is drained by two workers without a mail going out twice', async () => {
    const smtp = await startSmtp();
    enders.push(smtp.stop);
    const company = await makeTestCompany(machine);
    const ids = await Promise.all(Array.from({ length: 20 }, (_, index) => enqueue(company, { dueAt: clock - index })));
    startSender(smtp.port);
    startSender(smtp.port);
    for (const id of ids) await expect.poll(async () => (await row(id)).sent_at).not.toBeNull();
    expect(smtp.mails.filter(({ to }) => to === company.technician.email).length).toBe(20);
  });
});
