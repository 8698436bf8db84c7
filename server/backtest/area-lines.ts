import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import type { AlarmSignal } from '#shared/domain/detectors/detector.ts';
import type { AreaSignal } from '#shared/domain/fold/area/area-signal.ts';
import type { Listening } from '#shared/domain/fold/area/own-link.ts';
import { createAreaFold } from '#shared/domain/fold/fold-area.ts';
import type { PumpFold } from '#shared/domain/fold/fold-pump.ts';
import { type AlarmLines, lineKey } from './alarm-lines.ts';

/** A pad as the fold over all pads sees it. */
export type FoldedPad = { readonly serial: string; readonly area: string | undefined; readonly fold: PumpFold };

/** What befalls several pads at once, in lines. */
export type AreaLines = {
  /** Says how a pad's device is heard now. */
  readonly hear: (pad: FoldedPad, at: number) => void;
  /** What a pad's own fold said. */
  readonly take: (pad: FoldedPad, signal: AlarmSignal, at: number) => void;
  /** Time has passed, after every pad was heard. */
  readonly pass: (at: number, listening: Listening) => void;
  /** The trace ends: silence alone that lasts until then, since less than a day, is only the end of those pads' readings. */
  readonly end: (at: number) => void;
};

const ENDS_WITHIN_MS = 86_400_000;

export const foldedPad = ({ pumpId, area }: PumpContext, fold: PumpFold): FoldedPad => ({ serial: pumpId, area, fold });

/**
 * Every pad keeps its own line, which a silent neighbour's explains: there the power went. Only our own link, which
 * concerns no pad, is one line with the pads it took; theirs come out once it is back and they are not.
 */
export function createAreaLines(lines: AlarmLines): AreaLines {
  const area = createAreaFold();
  const bySilence = new Map<string, AreaSignal>();
  let knowsDrops = false;
  const hidden = new Map<string, { readonly pad: FoldedPad; readonly signal: AlarmSignal }>();

  const hear = ({ serial, fold, area: name }: FoldedPad, at: number): void => {
    area.hear({ pumpId: serial, padId: serial, area: name }, fold.silentSince(), at, fold.lostAt());
    tell();
  };

  const tell = (): void => {
    for (const signal of area.take()) {
      if (signal.kind === 'own-link') tellOwnLink(signal);
      else if (signal.kind === 'area-silence') for (const serial of signal.pumpIds) blamePower(serial);
    }
  };

  const tellOwnLink = (signal: AreaSignal): void => {
    const { type, key, detector, alarmClass, priority, evidence, from, at, pumpIds } = signal;
    const known = lines.find(key);
    const words = { class: alarmClass, priority, cause: 'link', evidence, pads: pumpIds };
    if (type === 'cleared') {
      lines.close(key, at);
      bySilence.delete(key);
      for (const serial of pumpIds) show(serial);
    } else if (known !== undefined) Object.assign(known, words);
    else {
      if (!knowsDrops) bySilence.set(key, signal);
      lines.open(key, { detector, from, raised: at, to: null, ...words });
    }
  };

  const show = (serial: string): void => {
    const own = hidden.get(serial);
    if (own === undefined || own.pad.fold.silentSince() === undefined) return;
    lines.take(serial, own.signal);
    hidden.delete(serial);
  };

  const blamePower = (serial: string): void => {
    const line = lines.find(lineKey(serial, 'silent'));
    if (line !== undefined && line.cause !== 'link') line.cause = 'power';
  };

  return {
    hear,
    pass: (at, listening) => {
      knowsDrops = listening.knowsDrops;
      area.pass(at, listening);
      tell();
    },
    end: (at) => {
      for (const [key, { from }] of bySilence) {
        if (at - from > ENDS_WITHIN_MS) continue;
        const pads = lines.find(key)?.pads ?? [];
        lines.withdraw(key);
        for (const serial of pads) show(serial);
      }
    },
    take: (pad, signal, at) => {
      const { serial } = pad;
      if (signal.detector !== 'silent') return lines.take(serial, signal);
      if (signal.type === 'raised') hear(pad, at);
      area.push(serial, signal, at);
      const covering = area.coveredBy(serial, 'silent');
      const isHidden = hidden.has(serial) || (signal.type === 'raised' && covering?.startsWith('own-link') === true);
      if (!isHidden) lines.take(serial, signal);
      else if (signal.type === 'raised') hidden.set(serial, { pad, signal });
      else if (signal.type === 'cleared') hidden.delete(serial);
      tell();
      if (covering?.startsWith('area-silence') === true && signal.type !== 'cleared') blamePower(serial);
    },
  };
}
