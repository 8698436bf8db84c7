import { describe, expect, it } from 'vitest';
import type { AlarmSignal } from '#shared/domain/detectors/detector.ts';
import { type AreaFold, createAreaFold } from '#shared/domain/fold/fold-area.ts';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;

const silent = (from: number, at: number): AlarmSignal => ({
  type: 'raised',
  detector: 'silent',
  alarmClass: 'alarm',
  priority: 'note',
  from,
  at,
  cause: 'unknown',
  evidence: {},
});
const shifted = (at: number): AlarmSignal => ({
  type: 'raised',
  detector: 'clock-shift',
  alarmClass: 'note',
  priority: 'note',
  from: at,
  at,
  cause: 'daylight-saving',
  evidence: {},
});

const fell = (from: number, cause = 'sudden'): AlarmSignal => ({
  type: 'raised',
  detector: 'low-load',
  alarmClass: 'alarm',
  priority: 'soon',
  from,
  at: from + 30 * MINUTE,
  cause,
  evidence: {},
});
const loadBack = (at: number): AlarmSignal => ({ type: 'cleared', detector: 'low-load', at, evidence: {} });

/** Pumps named by area and number, `North-3`; each on a pad of its own unless it names one. */
function fleet(fold: AreaFold, names: readonly string[]): void {
  for (const name of names) fold.hear(pump(name), undefined, 0);
}
const pump = (name: string) => ({ pumpId: name, padId: name, area: name.split('-')[0] ?? '' });
const names = (area: string, count: number): string[] =>
  Array.from({ length: count }, (_, index) => `${area}-${index}`);

describe('the fold over pumps', () => {
  it('makes one alarm of a street that went silent within ten minutes, and clears it when all are back', () => {
    const fold = createAreaFold();
    fleet(fold, [...names('North', 3), ...names('South', 30)]);
    for (const [index, name] of names('North', 3).entries()) fold.hear(pump(name), HOUR + index * 3 * MINUTE, 2 * HOUR);
    fold.push('North-0', silent(HOUR, 2 * HOUR), 2 * HOUR);
    fold.push('North-1', silent(HOUR + 3 * MINUTE, 2 * HOUR), 2 * HOUR + 3 * MINUTE);

    const [raised, ...rest] = fold.take();
    expect(raised).toMatchObject({
      type: 'raised',
      kind: 'area-silence',
      detector: 'silent',
      cause: 'power',
      area: 'North',
      from: HOUR,
      pumpIds: names('North', 3),
    });
    expect(rest).toEqual([]);
    expect(fold.coveredBy('North-2', 'silent')).toBe(raised?.key);
    expect(fold.coveredBy('South-0', 'silent')).toBeUndefined();

    for (const name of names('North', 3)) fold.hear(pump(name), undefined, 3 * HOUR);
    expect(fold.take()).toMatchObject([{ type: 'cleared', key: raised?.key }]);
  });

  it('leaves alone one pad with two pumps, pads of different areas, and last words far apart', () => {
    const fold = createAreaFold();
    fleet(fold, [...names('North', 4), ...names('South', 30)]);
    fold.hear({ pumpId: 'North-0', padId: 'same', area: 'North' }, HOUR, HOUR);
    fold.hear({ pumpId: 'North-1', padId: 'same', area: 'North' }, HOUR, HOUR);
    fold.hear(pump('South-0'), HOUR, HOUR);
    fold.hear(pump('North-2'), HOUR + 15 * MINUTE, 2 * HOUR);
    for (const name of ['North-0', 'North-1', 'South-0', 'North-2']) fold.push(name, silent(HOUR, 2 * HOUR), 2 * HOUR);

    expect(fold.take()).toEqual([]);
  });

  it('makes no area alarm where the area is not known', () => {
    const fold = createAreaFold();
    for (const name of ['a', 'b']) fold.hear({ pumpId: name, padId: name }, HOUR, HOUR);
    for (const name of ['a', 'b']) fold.push(name, silent(HOUR, 2 * HOUR), 2 * HOUR);
    expect(fold.take()).toEqual([]);
  });

  it('makes one list of the clocks that missed a daylight-saving shift', () => {
    const fold = createAreaFold();
    fleet(fold, [...names('North', 5), ...names('South', 5)]);
    for (const name of ['North-1', 'South-2', 'South-3']) fold.push(name, shifted(HOUR), HOUR);
    const signals = fold.take();
    expect(signals.map(({ type }) => type)).toEqual(['raised', 'changed', 'changed']);
    expect(signals.at(-1)).toMatchObject({
      kind: 'daylight-saving',
      alarmClass: 'note',
      pumpIds: ['North-1', 'South-2', 'South-3'],
    });

    for (const name of ['North-1', 'South-2', 'South-3']) {
      fold.push(name, { type: 'cleared', detector: 'clock-shift', at: 2 * HOUR, evidence: {} }, 2 * HOUR);
    }
    expect(fold.take().at(-1)?.type).toBe('cleared');
  });

  it('puts the motors’ own clocks on the same list, and a pump stays on it until both of its clocks are right', () => {
    const fold = createAreaFold();
    fleet(fold, names('North', 3));
    fold.push('North-0', shifted(HOUR), HOUR);
    fold.push('North-0', { ...shifted(HOUR), detector: 'motor-clock' } as AlarmSignal, HOUR);
    const key = fold.take()[0]?.key;
    expect(fold.coveredBy('North-0', 'motor-clock')).toBe(key);
    expect(fold.standing()).toEqual([{ key, pumpIds: ['North-0'], open: ['North-0'] }]);

    fold.push('North-0', { type: 'cleared', detector: 'clock-shift', at: 2 * HOUR, evidence: {} }, 2 * HOUR);
    expect(fold.take()).toEqual([]);
    expect(fold.coveredBy('North-0', 'clock-shift')).toBeUndefined();
    fold.push('North-0', { type: 'cleared', detector: 'motor-clock', at: 3 * HOUR, evidence: {} }, 3 * HOUR);
    expect(fold.take()).toMatchObject([{ type: 'cleared', key }]);
  });

  it('makes one list of the pads of an area that lost load within six hours, until each has it back', () => {
    const fold = createAreaFold();
    fleet(fold, [...names('North', 20), ...names('South', 20)]);
    for (const [index, name] of names('North', 4).entries()) {
      expect(fold.take()).toEqual([]);
      fold.push(name, fell(HOUR * (1 + index)), HOUR * (1 + index));
    }
    const [raised] = fold.take();
    expect(raised).toMatchObject({
      ...{ type: 'raised', kind: 'load-fall', detector: 'low-load', alarmClass: 'alarm', priority: 'soon' },
      ...{ cause: 'sudden', area: 'North', from: HOUR, pumpIds: names('North', 4) },
      evidence: { pads: 4, pumps: 4, area: 'North' },
    });
    fold.push('North-9', fell(6 * HOUR), 6 * HOUR);
    fold.push('South-0', fell(6 * HOUR), 6 * HOUR);
    fold.push('North-10', fell(13 * HOUR), 13 * HOUR);
    expect(fold.take()).toMatchObject([{ type: 'changed', key: raised?.key, evidence: { pads: 5 } }]);
    expect(fold.coveredBy('North-9', 'low-load')).toBe(raised?.key);
    expect(['South-0', 'North-10'].map((name) => fold.coveredBy(name, 'low-load'))).toEqual([undefined, undefined]);

    const again = createAreaFold(JSON.parse(JSON.stringify(fold.save())));
    again.push('North-9', fell(6 * HOUR, 'slow'), 9 * HOUR);
    for (const name of names('North', 3)) again.push(name, loadBack(10 * HOUR), 10 * HOUR);
    expect(again.standing()).toMatchObject([{ open: ['North-3'] }]);
    expect(again.take()).toEqual([]);
    again.push('North-3', loadBack(11 * HOUR), 11 * HOUR);
    expect(again.take()).toMatchObject([{ type: 'cleared', key: raised?.key }]);
  });

  it('leaves loads alone that fell on few pads, slowly, hours apart, in a large area, or where no area is known', () => {
    const play = (falls: readonly (readonly [string, AlarmSignal])[], fleetOf = names('North', 15)) => {
      const fold = createAreaFold();
      fleet(fold, fleetOf);
      for (const [name, signal] of falls) fold.push(name, signal, HOUR);
      return fold.take();
    };
    const four = (make: (index: number) => AlarmSignal) =>
      names('North', 4).map((name, index) => [name, make(index)] as const);

    expect(play(four(() => fell(HOUR)))).toHaveLength(1);
    expect(play(four(() => fell(HOUR)).slice(1))).toEqual([]);
    expect(play(four(() => fell(HOUR, 'slow')))).toEqual([]);
    expect(play(four((index) => fell(HOUR * (1 + 3 * index))))).toEqual([]);
    expect(
      play(
        four(() => fell(HOUR)),
        names('North', 20),
      ),
    ).toHaveLength(1);
    expect(
      play(
        four(() => fell(HOUR)),
        names('North', 21),
      ),
    ).toEqual([]);
    const nowhere = ['-0', '-1', '-2', '-3', '-4'];
    expect(
      play(
        nowhere.map((name) => [name, fell(HOUR)] as const),
        nowhere,
      ),
    ).toEqual([]);
  });

  it('lets a pump go that nobody watches any more', () => {
    const fold = createAreaFold();
    fleet(fold, names('North', 3));
    for (const name of names('North', 2)) fold.hear(pump(name), HOUR, HOUR);
    fold.push('North-0', silent(HOUR, 2 * HOUR), 2 * HOUR);
    expect(fold.take()).toMatchObject([{ evidence: { pumps: 2, pads: 2, stillStanding: 2, area: 'North' } }]);
    fold.keep(new Set(['North-0', 'North-2']), 3 * HOUR);
    expect(fold.standing()).toMatchObject([{ open: ['North-0'] }]);
    fold.keep(new Set(['North-2']), 3 * HOUR);
    expect(fold.take()).toMatchObject([{ type: 'cleared' }]);
  });

  const listening = { since: 0, knowsDrops: true };
  const thirdOf = (all: readonly string[]) => all.filter((_, index) => index % 3 === 0);
  const everywhere = [...names('North', 15), ...names('South', 15)];
  /** A third of the fleet drops, five seconds apart, and nobody comes back. */
  const dropThird = (fold: AreaFold): string[] => {
    fleet(fold, everywhere);
    const dropped = thirdOf(everywhere);
    for (const [index, name] of dropped.entries()) {
      const at = HOUR + index * 5000;
      fold.hear(pump(name), at - 7 * MINUTE, at, at);
    }
    return dropped;
  };

  it('blames our own link when over a fifth of the devices drop within two minutes and stay away, all over the place', () => {
    const fold = createAreaFold();
    const dropped = dropThird(fold);
    fold.pass(HOUR + MINUTE, listening);
    expect(fold.take()).toEqual([]);
    fold.pass(HOUR + 3 * MINUTE, listening);
    const [raised, ...rest] = fold.take();
    expect(raised).toMatchObject({ type: 'raised', kind: 'own-link', priority: 'urgent', from: HOUR });
    expect(raised?.pumpIds).toEqual(dropped);
    expect(rest).toEqual([]);
    fold.push('North-0', silent(HOUR, 2 * HOUR), 2 * HOUR);
    expect(fold.coveredBy('North-0', 'silent')).toBe(raised?.key);

    fold.hear(pump('South-1'), HOUR + 4 * MINUTE, HOUR + 4 * MINUTE, HOUR + 4 * MINUTE);
    fold.pass(HOUR + 8 * MINUTE, listening);
    expect(fold.take()).toMatchObject([{ type: 'changed', kind: 'own-link', evidence: { pumps: 11 } }]);
    for (const name of dropped) fold.hear(pump(name), undefined, 2 * HOUR);
    fold.pass(2 * HOUR, listening);
    expect(fold.take().at(-1)).toMatchObject({ type: 'cleared', kind: 'own-link' });
  });

  it('does not blame our link for drops while we stopped or just began, nor for devices that are back', () => {
    for (const since of [HOUR + 2 * MINUTE, HOUR - MINUTE]) {
      const fold = createAreaFold();
      dropThird(fold);
      for (let at = HOUR; at < 2 * HOUR; at += 30_000) fold.pass(at, { since, knowsDrops: true });
      expect(fold.take()).toEqual([]);
    }
    const fold = createAreaFold();
    for (const name of dropThird(fold).slice(4)) fold.hear(pump(name), undefined, HOUR + 1.8 * MINUTE);
    for (let at = HOUR; at < 2 * HOUR; at += 30_000) fold.pass(at, listening);
    expect(fold.take()).toEqual([]);
  });

  it('takes silence for our link only where no connection is known, and nearly all stay silent', () => {
    const outcome = (count: number, knowsDrops: boolean) => {
      const fold = createAreaFold();
      fleet(fold, everywhere);
      for (const name of everywhere.slice(0, count)) fold.hear(pump(name), HOUR, HOUR + 2 * MINUTE);
      fold.pass(HOUR + 9 * MINUTE, { since: 0, knowsDrops });
      expect(fold.take()).toEqual([]);
      fold.pass(HOUR + 11 * MINUTE, { since: 0, knowsDrops });
      return fold.take().map(({ kind }) => kind);
    };
    expect(outcome(20, false)).toEqual([]);
    expect(outcome(28, true)).toEqual([]);
    expect(outcome(28, false)).toEqual(['own-link']);
  });

  it('blames the area, not our link, when its power takes a quarter of the fleet', () => {
    const fold = createAreaFold();
    fleet(fold, [...names('North', 9), ...names('South', 27)]);
    for (const name of names('North', 9)) fold.hear(pump(name), HOUR, HOUR + 2 * MINUTE, HOUR);
    fold.pass(HOUR + 5 * MINUTE, listening);
    fold.push('North-0', silent(HOUR, 2 * HOUR), 2 * HOUR);
    expect(fold.take()).toMatchObject([{ kind: 'area-silence', pumpIds: names('North', 9) }]);
  });

  it('goes on from what was saved', () => {
    const fold = createAreaFold();
    fleet(fold, names('North', 3));
    for (const name of names('North', 2)) fold.hear(pump(name), HOUR, HOUR);
    fold.push('North-0', silent(HOUR, 2 * HOUR), 2 * HOUR);
    const [raised] = fold.take();
    const again = createAreaFold(JSON.parse(JSON.stringify(fold.save())));

    expect(again.coveredBy('North-1', 'silent')).toBe(raised?.key);
    for (const name of names('North', 2)) again.hear(pump(name), undefined, 3 * HOUR);
    expect(again.take()).toMatchObject([{ type: 'cleared', key: raised?.key }]);
    expect(createAreaFold({ members: 'x', alarms: [{}] }).take()).toEqual([]);
  });
});
