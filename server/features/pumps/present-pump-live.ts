import type { AlarmMark, PumpLive, PumpNow } from '#shared/contract/http/pumps.ts';
import type { PumpLiveRow } from './pump-live-read-model.ts';

/** The pump this instant; what the fold left out is null on the wire. */
function presentNow(row: NonNullable<PumpLiveRow['now']>): PumpNow {
  const { until, lockedBy, primed, because, flow, ...now } = row;
  return {
    ...now,
    because: { ...because },
    until: until ?? null,
    lockedBy: lockedBy ?? null,
    primed: primed ?? null,
    flow: flow ?? null,
  };
}

/** Evidence in the contract's shape: lists that whoever gets them may change. */
function presentMark({ evidence, ...mark }: NonNullable<PumpLiveRow['alarm']>): AlarmMark {
  const entries = Object.entries(evidence).map(([name, value]) => [name, isList(value) ? [...value] : value] as const);
  return { ...mark, evidence: Object.fromEntries(entries) };
}

const isList = (value: unknown): value is readonly (number | string)[] => Array.isArray(value);

export function presentPumpLive({ pumpId, now, heardAt, silentSince, alarm }: PumpLiveRow): PumpLive {
  return {
    pumpId,
    now: now === null ? null : presentNow(now),
    heardAt,
    silentSince,
    alarm: alarm === null ? null : presentMark(alarm),
  };
}
