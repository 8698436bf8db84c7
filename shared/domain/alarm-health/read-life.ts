import { isWorse, type Priority } from '../detectors/detector.ts';
import { DETECTOR_CLASSES } from '../detectors/detector-classes.data.ts';
import type { AlarmLife, LifeChange } from './alarm-life.ts';
import type { LifeStory } from './life-story.ts';

type Open<T> = { -readonly [Part in keyof T]: T[Part] };
type Story = { readonly [Part in 'annunciations' | 'standings' | 'asides']: Open<LifeStory[Part][number]>[] } & {
  readonly returns: number[];
};
type AsideKind = LifeStory['asides'][number]['kind'];

type Condition = {
  active: boolean;
  acknowledged: boolean;
  latched: boolean;
  priority: Priority;
  readonly aside: Set<AsideKind>;
};

const BEGINS_ASIDE: Partial<Record<LifeChange['kind'], AsideKind>> = {
  shelved: 'shelved',
  suppressed: 'suppressed',
  'out-of-service': 'out-of-service',
};
const ENDS_ASIDE: Partial<Record<LifeChange['kind'], AsideKind>> = {
  'shelf-ended': 'shelved',
  'suppression-ended': 'suppressed',
  'returned-to-service': 'out-of-service',
};

/** Taking back what one did oneself announces nothing to anybody. */
const SILENT: ReadonlySet<LifeChange['kind']> = new Set(['acknowledgement-withdrawn', 'nothing-to-do-withdrawn']);

/**
 * Follows one alarm through its changes. An annunciation is a transition into active and unacknowledged, in sight of its
 * operator; acknowledgements, returns and mails about one that waits already are none (ISA-18.2, see the facts).
 *
 * @example readLife(life).annunciations.length // 1: raised once, whatever became of it
 */
export function readLife(life: AlarmLife): LifeStory {
  const story: Story = { annunciations: [], standings: [], returns: [], asides: [] };
  const now: Condition = { active: false, acknowledged: false, latched: false, priority: 'note', aside: new Set() };
  const isAlarm = () => DETECTOR_CLASSES[life.detector].alarmClass === 'alarm' || now.priority !== 'note';
  const isInSight = () => isAlarm() && now.aside.size === 0;
  const waits = () => now.active && !now.acknowledged && !now.latched && isInSight();
  const stands = () => (now.active || now.latched) && isInSight();
  for (const change of life.changes) {
    const [waited, stood] = [waits(), stands()];
    follow(now, change, story);
    const { at } = change;
    if (!waited && waits() && !SILENT.has(change.kind)) {
      story.annunciations.push({ at, priority: now.priority, acknowledgedAt: null, escalated: false });
    }
    if (!stood && stands()) story.standings.push({ from: at, to: null });
    const last = story.standings.at(-1);
    if (stood && !stands() && last !== undefined) last.to = at;
  }
  return { life, ...story };
}

function follow(now: Condition, change: LifeChange, story: Story): void {
  const { kind, at, priority } = change;
  const worse = isWorse(priority, now.priority);
  const told = story.annunciations.at(-1);
  now.priority = priority;
  const begun = BEGINS_ASIDE[kind];
  if (begun !== undefined) setAside(now, begun, change, story);
  const ended = ENDS_ASIDE[kind];
  if (ended !== undefined) endAside(now, ended, at, story);
  if (kind === 'raised' || kind === 'raised-again') {
    now.active = true;
    if (kind === 'raised') now.acknowledged = false;
    if (kind === 'raised-again' && !now.latched) now.acknowledged = false;
  } else if (kind === 're-alarmed' || (kind === 'changed' && worse)) now.acknowledged = false;
  else if (kind === 'acknowledged' || kind === 'nothing-to-do' || kind === 'latch-released') {
    now.acknowledged = true;
    now.latched = false;
    if (told !== undefined) told.acknowledgedAt ??= at;
  } else if (SILENT.has(kind)) {
    now.acknowledged = false;
    if (told !== undefined) told.acknowledgedAt = null;
  } else if (kind === 'escalated' && told !== undefined) told.escalated = true;
  else if (kind === 'returned' || kind === 'latched') {
    now.active = false;
    if (kind === 'latched') now.latched = true;
    story.returns.push(at);
  }
}

function setAside(now: Condition, kind: AsideKind, { at, by, explained }: LifeChange, story: Story): void {
  if (now.aside.has(kind)) return;
  now.aside.add(kind);
  story.asides.push({ kind, from: at, to: null, explained: kind === 'suppressed' || (by !== null && explained) });
}

function endAside(now: Condition, kind: AsideKind, at: number, story: Story): void {
  now.aside.delete(kind);
  const open = story.asides.findLast((aside) => aside.kind === kind && aside.to === null);
  if (open !== undefined) open.to = at;
}
