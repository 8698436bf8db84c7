import type { AlarmRecord } from '#shared/domain/alarms/alarm-record.ts';
import { explainAlarm } from '#shared/domain/causes/explain-alarm.ts';
import type { FoundCounts } from '#shared/domain/causes/rank-causes.ts';
import { alarmWords } from '#shared/domain/wording/alarm-words.ts';
import { CAUTIONS } from '#shared/domain/wording/cautions.data.ts';
import { formatDuration } from '#shared/domain/wording/format-duration.ts';
import type { Announcement } from './choose-announcement.ts';
import { describeEvidence } from './describe-evidence.ts';
import { formatInstant } from './format-instant.ts';
import type { MailPlace } from './mail-place.ts';
import { writeSectionHtml } from './write-section-html.ts';
import { writeSectionText } from './write-section-text.ts';

/** What a mail says of one alarm, before it is laid out. */
export type MailSection = {
  readonly priority: string;
  readonly title: string;
  /** Why this mail comes at all, where it is not the first one. */
  readonly lead: string | undefined;
  readonly meaning: string;
  readonly facts: readonly { readonly name: string; readonly value: string }[];
  readonly evidence: readonly { readonly name: string; readonly value: string }[];
  /** The likeliest first, each with what speaks for and against it; `guess` = nothing singles one out. */
  readonly likely: { readonly guess: boolean; readonly causes: readonly MailCause[] };
  readonly look: readonly { readonly what: string; readonly why: string }[];
  readonly cautionTitle: string;
  readonly cautions: readonly string[];
  readonly link: string;
};

/** One alarm's mail as it is frozen: a mail that gathers several puts their sections one under another. */
export type ComposedMail = { readonly subject: string; readonly text: string; readonly html: string };

export type MailCause = { readonly name: string; readonly check: string; readonly reasons: readonly string[] };

export type MailMatter = {
  readonly alarmId: string;
  readonly record: AlarmRecord;
  readonly place: MailPlace;
  readonly announcement: Announcement;
  readonly publicUrl: string;
  /** How often this company found each cause of the alarm's detector. */
  readonly found?: FoundCounts | undefined;
  /** It speaks for several pumps: the causes that are weighed are those of one. */
  readonly isGroup?: boolean;
};

const PRIORITY_WORDS = { urgent: 'Urgent', soon: 'Soon', note: 'Note' } as const;

/** Writes the mail about an alarm: what, where, since when, what speaks for it, what to look at first, how to stay safe. */
export function composeAlarmMail(matter: MailMatter): ComposedMail {
  const section = describeSection(matter);
  const prefix = matter.announcement.reason === 'escalated' ? 'Not acknowledged' : section.priority;
  return {
    subject: `${prefix}: ${section.title} · ${matter.place.padName}, ${matter.place.pumpName}`,
    text: writeSectionText(section),
    html: writeSectionHtml(section),
  };
}

function describeSection({ alarmId, record, place, announcement, publicUrl, found, isGroup }: MailMatter): MailSection {
  const words = alarmWords(record.detector, record.cause, record.evidence);
  return {
    priority: PRIORITY_WORDS[record.priority],
    title: words.title,
    lead: findLead(record, announcement.reason),
    meaning: words.meaning,
    facts: listFacts(record, place),
    evidence: describeEvidence(record.evidence, place.zone),
    likely: isGroup === true ? NOTHING_LIKELY : listLikely(record, place, found),
    look: words.look,
    cautionTitle: CAUTIONS[words.task].title,
    cautions: words.cautions,
    link: `${publicUrl}/alarms/${alarmId}`,
  };
}

const NOTHING_LIKELY: MailSection['likely'] = { guess: false, causes: [] };

/** As many as one reads standing at a pad. */
const MOST_CAUSES = 3;

function listLikely(record: AlarmRecord, { zone }: MailPlace, found: FoundCounts | undefined): MailSection['likely'] {
  const { causes, certain } = explainAlarm(record, zone, found);
  const listed = causes.filter(({ standing }) => standing !== 'unlikely').slice(0, MOST_CAUSES);
  return {
    guess: !certain,
    causes: listed.map(({ name, check, detectorSays, reasonsFor, reasonsAgainst, found: times, calls }) => ({
      name,
      check,
      reasons: [
        ...(detectorSays ? ['for it: the rule read it from the figures'] : []),
        ...reasonsFor.map((reason) => `for it: ${reason}`),
        ...reasonsAgainst.map((reason) => `against it: ${reason}`),
        ...(times > 0 ? [`found in ${times} of ${calls} of our own cases`] : []),
      ],
    })),
  };
}

function listFacts(record: AlarmRecord, place: MailPlace) {
  const where = [place.street === place.padName ? undefined : place.street, place.town, place.area];
  const facts = [
    { name: 'Pump', value: place.pumpName },
    { name: 'Pad', value: [place.padName, ...where].filter((part) => part !== undefined).join(', ') },
    ...(place.customerName === undefined ? [] : [{ name: 'Customer', value: place.customerName }]),
    { name: 'Since', value: formatInstant(record.from, place.zone) },
    { name: 'Raised', value: formatInstant(record.raisedAt, place.zone) },
  ];
  return record.count > 1 ? [...facts, { name: 'Times', value: `${record.count}` }] : facts;
}

function findLead(record: AlarmRecord, reason: Announcement['reason']): string | undefined {
  if (reason === 'escalated') {
    const waited = formatDuration(((record.escalatedAt ?? record.waitingSince) - record.waitingSince) / 60_000);
    return `Nobody has acknowledged this alarm for ${waited}.`;
  }
  if (reason === 'raised-again') return 'This alarm came back before anybody acknowledged that it had gone.';
  if (reason === 'assigned') return 'This was given to you.';
  if (reason === 'worse') return 'This alarm became more pressing.';
  if (reason === 're-alarmed') return 'This alarm was acknowledged and its condition still stands.';
  return reason === 'shelf-ended'
    ? 'This alarm was held, the time is over, and its condition still stands.'
    : undefined;
}
