import { describe, expect, it } from 'vitest';
import { composeAlarmMail, type MailMatter } from '#server/mail/compose-alarm-mail.ts';
import { describeEvidence } from '#server/mail/describe-evidence.ts';
import { gatherMail } from '#server/mail/gather-mail.ts';
import type { AlarmRecord } from '#shared/domain/alarms/alarm-record.ts';
import { applySignal } from '#shared/domain/alarms/apply-signal.ts';
import { DETECTORS } from '#shared/domain/detectors/detector.ts';
import { CAUTIONS } from '#shared/domain/wording/cautions.data.ts';

// 2025-07-14 06:02 in Phoenix (UTC−7 all year).
const AT = Date.UTC(2025, 6, 14, 13, 2);
const RECORD: AlarmRecord = applySignal(undefined, {
  type: 'raised',
  detector: 'failed-prime',
  alarmClass: 'alarm',
  priority: 'urgent',
  from: AT,
  at: AT + 7 * 60_000,
  cause: 'air-leak',
  evidence: { tries: 3, primedWatts: 1340, measuredWatts: 310, startedAt: AT },
})!.record;

const PLACE = {
  companyId: '0',
  companyName: 'Larkmoor',
  companyZone: 'America/Phoenix',
  mailHours: { days: [], fromMinute: 0, toMinute: 1440 },
  padId: '1',
  padName: '12 <Heron> Way',
  street: '12 Heron Way',
  town: 'Larkmoor',
  area: 'North',
  zone: 'America/Phoenix',
  pumpName: 'Filter pump',
  customerName: 'Ada Example',
  technician: undefined,
  managers: [],
};
const matter = (change: Partial<MailMatter> = {}): MailMatter => ({
  alarmId: '01980000-0000-7000-8000-000000000001',
  record: RECORD,
  place: PLACE,
  announcement: { reason: 'raised', transition: 'raised 1' },
  publicUrl: 'https://watch.larkmoor.example',
  ...change,
});

describe('the mail about an alarm', () => {
  const mail = composeAlarmMail(matter());

  it('says what, where, since when, what speaks for it, what to look at first, and how to stay safe', () => {
    expect(mail.subject).toBe('Urgent: Did not prime, 3 tries · 12 <Heron> Way, Filter pump');
    for (const part of [
      'URGENT: Did not prime, 3 tries',
      'Filter pump',
      '12 Heron Way, Larkmoor, North',
      'Ada Example',
      'Mon, Jul 14, 2025, 06:02 MST',
      '- measured watts: 310 W',
      '- started at: Mon, Jul 14, 2025, 06:02 MST',
      '1. ',
      'https://watch.larkmoor.example/alarms/01980000-0000-7000-8000-000000000001',
    ]) {
      expect(mail.text).toContain(part);
    }
    const cautions = Object.values(CAUTIONS).find(({ title }) => mail.text.includes(title))!;
    for (const line of cautions.lines) expect(mail.text).toContain(line);
  });

  it('says the same in HTML, and nothing of the data can become markup', () => {
    expect(mail.html).toContain('12 &lt;Heron&gt; Way');
    expect(mail.html).not.toContain('<Heron>');
    expect(mail.html).toContain('href="https://watch.larkmoor.example/alarms/01980000-0000-7000-8000-000000000001"');
    expect(mail.html).not.toMatch(/<script|<img|src=/);
  });

  it('says why it comes again', () => {
    const escalated = { ...RECORD, escalatedAt: RECORD.waitingSince + 15 * 60_000 };
    const again = composeAlarmMail(
      matter({ record: escalated, announcement: { reason: 'escalated', transition: 'x' } }),
    );
    expect(again.subject).toMatch(/^Not acknowledged: /);
    expect(again.text).toContain('Nobody has acknowledged this alarm for 15 min.');
  });

  it.each(DETECTORS)('can be written for %s with a cause nobody knows and no evidence', (detector) => {
    const { subject, text, html } = composeAlarmMail(
      matter({ record: { ...RECORD, detector, cause: 'unknown', evidence: {} } }),
    );
    for (const written of [subject, text, html]) {
      expect(written.length).toBeGreaterThan(10);
      expect(written).not.toMatch(/undefined|null|NaN|\{\w+\}/);
    }
  });
});

describe('a mail of several parts', () => {
  const parts = [
    composeAlarmMail(matter()),
    composeAlarmMail(matter({ alarmId: '01980000-0000-7000-8000-000000000002' })),
  ];

  it('says how many they are, holds each whole, and the disclaimer once', () => {
    const mail = gatherMail(parts);
    expect(mail.subject).toBe(`2 alarms: ${parts[0]!.subject}`);
    for (const part of parts) expect(mail.text).toContain(part.text);
    expect(mail.text.match(/Millrace only watches/g)?.length).toBe(1);
    expect(mail.html.match(/<!doctype html>/g)?.length).toBe(1);
  });

  it('is the same mail whenever it is gathered', () => {
    expect(gatherMail(parts)).toEqual(gatherMail(parts));
  });
});

describe('evidence in words', () => {
  it('gives every number its unit and leaves out what is empty', () => {
    const evidence = {
      measuredRpm: 1690.4,
      waitedSeconds: 90,
      lastedMinutes: 95,
      droppedShare: 0.41,
      driveCelsius: 41.25,
      code: 'E12',
      clamped: true,
      note: '',
      gone: null,
      edgesAt: [AT, AT],
    };
    expect(describeEvidence(evidence, 'America/Phoenix')).toEqual([
      { name: 'measured speed', value: '1,690 rpm' },
      { name: 'waited', value: '90 s' },
      { name: 'lasted', value: '1 h 35' },
      { name: 'dropped share', value: '41 %' },
      { name: 'drive temperature', value: '106 °F (41 °C)' },
      { name: 'code', value: 'E12' },
      { name: 'clamped', value: 'yes' },
      { name: 'edges at', value: 'Mon, Jul 14, 2025, 06:02 MST, Mon, Jul 14, 2025, 06:02 MST' },
    ]);
  });
});
