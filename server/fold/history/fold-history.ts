import type pg from 'pg';
import { parseLine } from '#server/backtest/parse-line.ts';
import type { CommissionedPump } from '#server/db/commissioned-pumps.ts';
import { encodeSettings } from '#shared/contract/mqtt/settings.ts';
import { encodeStatus } from '#shared/contract/mqtt/status.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';
import { saveAlarmChanges } from '../alarms-repository.ts';
import { takeArrivalNumber } from '../fold-repository.ts';
import { createHistoryPump, type HistoryPump } from './history-pump.ts';
import { createHistoryReadings } from './history-readings.ts';
import { listTechnicians, makePartitionsBetween, saveHistoryPump } from './history-repository.ts';

export type FoldHistoryOptions = {
  /** One connection of the machine role, in a transaction: all of the history is stored, or none. */
  readonly client: pg.ClientBase;
  readonly pumps: readonly CommissionedPump[];
  /** Lines of a backtest's readings file, some at a time, in order of arrival. */
  readonly lines: AsyncIterable<readonly string[]>;
  readonly from: number;
  readonly to: number;
  readonly cadenceSeconds: number;
  readonly onProgress: (text: string) => void;
};

/** Time is told to every pump when it has advanced this far: silence is judged in minutes. */
const TELL_TIME_EVERY_MS = 60_000;
const DAY_MS = 86_400_000;

/**
 * Stores and folds what devices said in the past, through the same fold as live readings, and leaves every pump where
 * the live fold goes on. Nobody is mailed. Answers how many readings were stored.
 */
export async function foldHistory(options: FoldHistoryOptions): Promise<number> {
  const { client, pumps, lines, from, to, cadenceSeconds, onProgress } = options;
  await makePartitionsBetween(client, from, to + DAY_MS);
  const technicians = await listTechnicians(client);
  const bySerial = new Map<string, HistoryPump>();
  for (const pump of pumps) {
    const { device, pumpId } = pump;
    if (device !== undefined)
      bySerial.set(device.serial, createHistoryPump(pump, cadenceSeconds, technicians.get(pumpId)));
  }
  const readings = createHistoryReadings(client);
  const progress = createDayCount(from, to, onProgress);
  let toldAt = 0;
  for await (const some of lines) {
    for (const text of some) {
      const line = parseLine(text);
      const history = line.kind === 'event' ? bySerial.get(line.serial) : undefined;
      if (line.kind !== 'event' || history === undefined) continue;
      const { event } = line;
      if (event.receivedAt - toldAt >= TELL_TIME_EVERY_MS) {
        toldAt = event.receivedAt;
        tellTime(bySerial.values(), toldAt, cadenceSeconds);
        progress(toldAt);
      }
      history.take(event);
      if (event.kind === 'reading')
        await readings.add(event.reading, history.pump.pumpNumber, event.receivedAt, event.single);
      else {
        await readings.settle();
        await storeEvent(client, history, event);
      }
    }
  }
  await readings.flush();
  onProgress('Storing runs, alarms and what was learnt');
  await saveAll(client, [...bySerial.values()], to);
  return readings.count();
}

/** A pump that has just spoken knows the time. */
function tellTime(histories: Iterable<HistoryPump>, receivedAt: number, cadenceSeconds: number): void {
  for (const history of histories) {
    if (receivedAt - (history.heardAt() ?? 0) > cadenceSeconds * 2000) history.take({ kind: 'time', receivedAt });
  }
}

async function storeEvent(client: pg.ClientBase, { pump }: HistoryPump, event: PumpEvent): Promise<void> {
  if (pump.device === undefined || (event.kind !== 'status' && event.kind !== 'settings')) return;
  const body = event.kind === 'status' ? encodeStatus(event.status) : encodeSettings(event.settings);
  await client.query({
    name: 'history-event',
    text: `insert into device_events (sequence, company_id, device_id, pump_id, kind, received_at, body)
      values (nextval('arrival_sequence'), $1, $2, $3, $4, to_timestamp($5::float8 / 1000), $6)`,
    values: [pump.companyId, pump.device.id, pump.pumpId, event.kind, event.receivedAt, body],
  });
}

async function saveAll(client: pg.ClientBase, histories: readonly HistoryPump[], now: number): Promise<void> {
  const cursor = await takeArrivalNumber(client);
  for (const history of histories) {
    history.finish(now);
    await saveHistoryPump(client, history, cursor);
    const { companyId, pumpId, padId } = history.pump;
    const changes = history.alarms.map(({ id, record, transitions }) => ({
      alarmId: id,
      companyId,
      pumpId,
      padId,
      isNew: true,
      isBacklog: true,
      record,
      transitions,
    }));
    await saveAlarmChanges(client, changes);
  }
}

/** Says every few days how far the history has come. */
function createDayCount(from: number, to: number, onProgress: (text: string) => void): (at: number) => void {
  const days = Math.round((to - from) / DAY_MS);
  let said = 0;
  return (at) => {
    const day = Math.floor((at - from) / DAY_MS);
    if (day < said + 5) return;
    said = day;
    onProgress(`Folding the demo’s history: day ${day} of ${days}`);
  };
}
