import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { createPumpFold, type PumpFold } from '#shared/domain/fold/fold-pump.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';
import { type AlarmLine, createAlarmLines } from './alarm-lines.ts';

/** Arrival time is told to every pad when it has advanced this far: silence is judged in minutes. */
const TELL_TIME_EVERY_MS = 30_000;

/** How often a pad's outputs are gathered, in its own events: runs are of no interest here. */
const TAKE_EVERY_EVENTS = 64;

type Pad = { readonly serial: string; readonly fold: PumpFold; waiting: number; heardAt: number };

export type BacktestCount = { readings: number; late: number; unknownSerials: Map<string, number> };

export type Backtest = {
  /** Takes one event in order of arrival; false where no pad has this serial. */
  readonly take: (serial: string, event: PumpEvent) => boolean;
  /** Alarms that will not change any more, in order of raising. */
  readonly settled: () => AlarmLine[];
  /** Ends it and gives what is left. */
  readonly end: () => AlarmLine[];
  readonly count: () => BacktestCount;
};

/**
 * The same fold that runs live, over events in order of arrival; `pumpId` of each context is the serial.
 * Memory holds one state a pad and the alarms not yet given out.
 */
export function createBacktest(contexts: readonly PumpContext[]): Backtest {
  const pads = new Map<string, Pad>(
    contexts.map((context) => [
      context.pumpId,
      { serial: context.pumpId, fold: createPumpFold(context), waiting: 0, heardAt: Number.NEGATIVE_INFINITY },
    ]),
  );
  const lines = createAlarmLines();
  const count: BacktestCount = { readings: 0, late: 0, unknownSerials: new Map() };
  let toldAt: number | undefined;
  let lastArrival = 0;

  const gather = (pad: Pad): void => {
    pad.waiting = 0;
    lines.take(pad.serial, pad.fold.take().signals);
  };

  const tellTime = (receivedAt: number): void => {
    for (const pad of pads.values()) {
      // A pad that has just spoken knows the time.
      if (receivedAt - pad.heardAt >= TELL_TIME_EVERY_MS) {
        pad.fold.push({ kind: toldAt === undefined ? 'listening' : 'time', receivedAt });
      }
      gather(pad);
    }
    toldAt = receivedAt;
  };

  const push = (pad: Pad, event: PumpEvent): void => {
    if (event.kind === 'reading') {
      count.readings += 1;
      const highWater = pad.fold.highWater();
      if (highWater !== undefined && event.reading.at <= highWater) {
        count.late += 1;
        return;
      }
    }
    pad.fold.push(event);
    pad.heardAt = event.receivedAt;
    pad.waiting += 1;
    if (pad.waiting >= TAKE_EVERY_EVENTS) gather(pad);
  };

  return {
    take: (serial, event) => {
      lastArrival = Math.max(lastArrival, event.receivedAt);
      if (toldAt === undefined || lastArrival - toldAt >= TELL_TIME_EVERY_MS) tellTime(lastArrival);
      const pad = pads.get(serial);
      if (pad === undefined) {
        count.unknownSerials.set(serial, (count.unknownSerials.get(serial) ?? 0) + 1);
        return false;
      }
      push(pad, event);
      return true;
    },
    settled: () => (toldAt === undefined ? [] : lines.settled(toldAt)),
    end: () => {
      if (toldAt !== undefined) tellTime(lastArrival);
      return lines.rest();
    },
    count: () => count,
  };
}
