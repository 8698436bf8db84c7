import type pg from 'pg';
import type { AlarmSignal, Detector } from '#shared/domain/detectors/detector.ts';
import { isRecord } from '#shared/domain/detectors/plain-state.ts';
import type { AreaSignal } from '#shared/domain/fold/area/area-signal.ts';
import { type AreaFold, type AreaPump, type AreaStanding, createAreaFold } from '#shared/domain/fold/fold-area.ts';
import type { FoldWrite } from '../fold-write.ts';
import { type AreaMember, listAreaMembers, lockAreaState, saveAreaState } from './area-repository.ts';

/** What the fold over a company's pumps made of one commit. */
export type AreaOutcome = {
  readonly companyId: string;
  readonly signals: readonly AreaSignal[];
  /** Alarms whose members changed, as they stand after it. */
  readonly touched: readonly AreaStanding[];
  /** Pumps whose own alarms may have to be suppressed or spoken again. */
  readonly pumpIds: readonly string[];
  readonly coveredBy: (pumpId: string, detector: Detector) => string | undefined;
  readonly isSilent: (pumpId: string) => boolean;
};

/** Detectors whose alarms one alarm may speak for. */
export const GROUPED_DETECTORS: readonly Detector[] = ['silent', 'clock-shift', 'motor-clock', 'low-load'];

const concernsAreas = ({ detector }: AlarmSignal): boolean => GROUPED_DETECTORS.includes(detector);

/**
 * Whether a write tells the area fold anything: silence or a drop that began, lasted or ended, or an alarm that others
 * may share.
 */
export const hasAreaNews = ({ slot, silentSince, lostAt, stayedAway, signals }: FoldWrite): boolean =>
  stayedAway ||
  (silentSince === undefined) !== (slot.storedSilentSince === undefined) ||
  (lostAt === undefined) !== (slot.storedLostAt === undefined) ||
  signals.some(concernsAreas);

type Moment = { readonly now: number; readonly listeningSince: number };

/**
 * Folds what some writes tell over the pumps of their companies, in the transaction that stores the writes. Its state is
 * a row a company, locked meanwhile: processes that fold pumps of one company take turns.
 */
export async function foldAreas(
  client: pg.PoolClient,
  writes: readonly FoldWrite[],
  moment: Moment,
): Promise<AreaOutcome[]> {
  const news = writes.filter(hasAreaNews);
  const companyIds = [...new Set(news.map(({ slot }) => slot.pump.companyId))].sort();
  const outcomes: AreaOutcome[] = [];
  for (const companyId of companyIds) {
    const own = news.filter(({ slot }) => slot.pump.companyId === companyId);
    const outcome = await foldCompany(client, companyId, own, moment);
    if (outcome !== undefined) outcomes.push(outcome);
  }
  return outcomes;
}

async function foldCompany(
  client: pg.PoolClient,
  companyId: string,
  writes: readonly FoldWrite[],
  { now, listeningSince }: Moment,
): Promise<AreaOutcome | undefined> {
  const saved = await lockAreaState(client, companyId);
  const isQuiet = Array.isArray(saved) && saved.length === 0;
  // A device that is heard again says nothing where no alarm stands.
  if (isQuiet && writes.every(({ silentSince, signals }) => silentSince === undefined && signals.every(isEnd)))
    return undefined;
  const members = await listAreaMembers(client, companyId);
  const fold = createAreaFold({ members: asBefore(members, writes).map(toSaved), alarms: saved });
  const before = new Map(fold.standing().map((alarm) => [alarm.key, alarm]));
  fold.keep(new Set(members.map(({ pumpId }) => pumpId)), now);
  tell(fold, writes, now);
  // Devices that can connect are known to be gone by their will; one that only says nothing has not dropped.
  fold.pass(now, { since: listeningSince, knowsDrops: true });
  const signals = mergeSignals(fold.take());
  const touched = fold.standing().filter((alarm) => isOther(before.get(alarm.key), alarm));
  if (touched.length > 0 || signals.length > 0) await saveAreaState(client, companyId, alarmsOf(fold));
  const silent = new Set(
    writes.filter(({ silentSince }) => silentSince !== undefined).map(({ slot }) => slot.pump.pumpId),
  );
  for (const { pumpId, lastWord } of members) if (lastWord !== 0) silent.add(pumpId);
  const ended = signals.filter(({ type }) => type === 'cleared').map(({ key }) => before.get(key)?.pumpIds ?? []);
  const told = writes.map(({ slot }) => slot.pump.pumpId);
  return {
    companyId,
    signals,
    touched,
    pumpIds: [...new Set([...told, ...ended.flat(), ...touched.flatMap(({ pumpIds }) => pumpIds)])],
    coveredBy: fold.coveredBy,
    isSilent: (pumpId) => silent.has(pumpId),
  };
}

const isEnd = ({ type }: AlarmSignal): boolean => type === 'cleared';

/** The members as they were before these writes: what is stored by now is what the fold is about to be told. */
function asBefore(members: readonly AreaMember[], writes: readonly FoldWrite[]): AreaMember[] {
  const written = new Map(writes.map((write) => [write.slot.pump.pumpId, write]));
  return members.map((member) => {
    const write = written.get(member.pumpId);
    if (write === undefined) return member;
    const { storedSilentSince, storedLostAt = 0 } = write.slot;
    const lastWord = storedSilentSince === undefined ? 0 : (write.heardAt ?? storedSilentSince);
    return { ...member, lastWord, lostAt: storedLostAt };
  });
}

const toSaved = ({ pumpId, padId, area, lastWord, fellAt, lostAt }: AreaMember) => [
  pumpId,
  padId,
  area ?? '',
  lastWord,
  fellAt,
  lostAt,
];

function tell(fold: AreaFold, writes: readonly FoldWrite[], now: number): void {
  for (const { slot, silentSince, heardAt, lostAt } of writes) {
    const { pumpId, padId, context } = slot.pump;
    const pump: AreaPump = { pumpId, padId, area: context.area };
    fold.hear(pump, silentSince === undefined ? undefined : (heardAt ?? silentSince), now, lostAt);
  }
  for (const { slot, signals } of writes) {
    for (const signal of signals) if (concernsAreas(signal)) fold.push(slot.pump.pumpId, signal, now);
  }
}

/** What was said of one alarm within a commit, in one sentence: nobody needs to hear of every pump that joined. */
export function mergeSignals(signals: readonly AreaSignal[]): AreaSignal[] {
  const merged: AreaSignal[] = [];
  for (const signal of signals) {
    const index = merged.findLastIndex(({ key }) => key === signal.key);
    const earlier = merged[index];
    if (earlier === undefined || signal.type !== 'changed' || earlier.type === 'cleared') merged.push(signal);
    else merged[index] = { ...signal, type: earlier.type, at: earlier.at };
  }
  return merged;
}

const isOther = (before: AreaStanding | undefined, { pumpIds, open }: AreaStanding): boolean =>
  before?.pumpIds.length !== pumpIds.length || before.open.join() !== open.join();

function alarmsOf(fold: AreaFold): string {
  const saved = fold.save();
  return JSON.stringify(isRecord(saved) ? (saved.alarms ?? []) : []);
}
