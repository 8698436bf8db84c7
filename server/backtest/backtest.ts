import { AHEAD_LIMIT_MS } from '#shared/contract/mqtt/wire-limits.ts';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { createPumpFold } from '#shared/domain/fold/fold-pump.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';
import { type AlarmLine, createAlarmLines } from './alarm-lines.ts';
import { createAreaLines, type FoldedPad, foldedPad } from './area-lines.ts';

/** Arrival time is told to every pad when it has advanced this far: silence is judged in minutes. */
const TELL_TIME_EVERY_MS = 30_000;
/** Where no line comes for longer, time goes on in steps: minutes at first, then quarters of an hour. */
const FINE_STEP_MS = 60_000;
const FINE_FOR_MS = 2 * 3_600_000;
const COARSE_STEP_MS = 15 * 60_000;

/**
 * So many events of a pad wait to be folded together: pads take turns line by line, and a fold whose state has to be
 * fetched from memory for every reading is several times slower.
 */
const FOLD_TOGETHER = 64;

const MOST_UNKNOWN = 1000;

/** `told` = as its neighbours were told that it is heard; undefined before that. */
type Pad = FoldedPad & {
  readonly inputs: number;
  readonly waiting: PumpEvent[];
  heardAt: number;
  told: 'heard' | 'silent' | 'lost' | undefined;
};

export type BacktestCount = { readings: number; late: number; unknownSerials: Map<string, number> };

export type Backtest = {
  /** Takes one event in order of arrival; answers why it was refused, undefined where it was not. */
  readonly take: (serial: string, event: PumpEvent) => string | undefined;
  /** Alarms that will not change any more, in order of raising. */
  readonly settled: () => AlarmLine[];
  /** Ends it and gives what is left. */
  readonly end: () => AlarmLine[];
  readonly count: () => BacktestCount;
};

const createPad = (context: PumpContext): Pad => ({
  ...foldedPad(context, createPumpFold(context)),
  inputs: context.traits.inputCount,
  waiting: [],
  heardAt: Number.NEGATIVE_INFINITY,
  told: undefined,
});

/**
 * The same fold that runs live, over events in order of arrival; `pumpId` of each context is the serial.
 * Memory holds one state a pad and the alarms not yet given out.
 */
export function createBacktest(contexts: readonly PumpContext[]): Backtest {
  const pads = new Map<string, Pad>(contexts.map((context) => [context.pumpId, createPad(context)]));
  const lines = createAlarmLines();
  const areas = createAreaLines(lines);
  const count: BacktestCount = { readings: 0, late: 0, unknownSerials: new Map() };
  let toldAt: number | undefined;
  let beganAt: number | undefined;
  let hasStatus = false;
  let lastArrival = 0;

  const gather = (pad: Pad, at: number): void => {
    const { fold, waiting } = pad;
    for (const event of waiting) {
      const isLate = event.kind === 'reading' && event.reading.at <= (fold.highWater() ?? Number.NEGATIVE_INFINITY);
      if (isLate) count.late += 1;
      fold.push(event);
    }
    waiting.length = 0;
    for (const signal of fold.take().signals) areas.take(pad, signal, at);
  };

  const gatherAll = (): void => {
    for (const pad of pads.values()) gather(pad, lastArrival);
  };

  const tellTime = (receivedAt: number): void => {
    const kind = toldAt === undefined ? 'listening' : 'time';
    const concerned: Pad[] = [];
    for (const pad of pads.values()) {
      // A pad that has just spoken knows the time.
      const quiet = receivedAt - pad.heardAt >= TELL_TIME_EVERY_MS;
      if (!quiet && pad.told === 'heard') continue;
      if (quiet) pad.waiting.push({ kind, receivedAt });
      gather(pad, receivedAt);
      concerned.push(pad);
    }
    // Only then, so that nobody is taken for silent whose word is still waiting.
    for (const pad of concerned) tellNeighbours(pad, receivedAt);
    beganAt ??= receivedAt;
    areas.pass(receivedAt, { since: beganAt, knowsDrops: hasStatus });
    toldAt = receivedAt;
  };

  const tellNeighbours = (pad: Pad, at: number): void => {
    const { fold } = pad;
    const heard = fold.silentSince() === undefined ? 'heard' : fold.lostAt() === undefined ? 'silent' : 'lost';
    if (heard !== pad.told) areas.hear(pad, at);
    pad.told = heard;
  };

  /** A rule that counts time speaks when its time has come, not when the next line does. */
  const advance = (to: number): void => {
    const quietFrom = toldAt ?? to;
    for (let at = quietFrom; at < to; ) {
      at += at - quietFrom < FINE_FOR_MS ? FINE_STEP_MS : COARSE_STEP_MS;
      if (at < to) tellTime(at);
    }
    tellTime(to);
  };

  const push = (pad: Pad, event: PumpEvent): void => {
    if (event.kind === 'reading') count.readings += 1;
    if (event.kind === 'status') hasStatus = true;
    pad.heardAt = Math.max(pad.heardAt, event.receivedAt);
    if (pad.waiting.push(event) >= FOLD_TOGETHER) gather(pad, lastArrival);
  };

  return {
    take: (serial, event) => {
      lastArrival = Math.max(lastArrival, event.receivedAt);
      if (toldAt === undefined || lastArrival - toldAt >= TELL_TIME_EVERY_MS) advance(lastArrival);
      const pad = pads.get(serial);
      if (pad === undefined) {
        countUnknown(count.unknownSerials, serial);
        return undefined;
      }
      const refusal = event.kind === 'reading' ? refusalOf(pad, event) : undefined;
      if (refusal === undefined) push(pad, event);
      return refusal;
    },
    settled: () => {
      gatherAll();
      return toldAt === undefined ? [] : lines.settled(toldAt);
    },
    end: () => {
      if (toldAt !== undefined) tellTime(lastArrival);
      gatherAll();
      areas.end(lastArrival);
      return lines.rest();
    },
    count: () => count,
  };
}

/** Counts by serial, as long as there are not so many that the file is of another fleet. */
function countUnknown(times: Map<string, number>, serial: string): void {
  const key = times.has(serial) || times.size < MOST_UNKNOWN ? serial : 'any other';
  times.set(key, (times.get(key) ?? 0) + 1);
}

/** What the broker refuses by what it knows of the pump and of the time. */
function refusalOf({ inputs }: Pad, { reading, receivedAt }: PumpEvent & { kind: 'reading' }): string | undefined {
  if (reading.at > receivedAt + AHEAD_LIMIT_MS) return 'ahead';
  if (reading.closedInputs >= 1 << inputs) return 'in-beyond-model';
  return reading.activeInput > inputs ? 'act-beyond-model' : undefined;
}
