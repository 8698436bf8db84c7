import { createZone } from '#simulator/clocks/zone.ts';
import { listLarkmoorPumps } from '#simulator/larkmoor.ts';
import { createPump } from '#simulator/pump.ts';
import type { PumpSpec } from '#simulator/pump-spec.ts';
import { createVirtualPump, type News, type VirtualPump } from '#simulator/virtual-pump.ts';

/** Monday 14 September 2026, midnight in Los Angeles: far from any change of the clocks. */
export const MONDAY = Date.UTC(2026, 8, 14, 7);

/** One of the demo company's pumps by its pad, changed where a test needs it. */
export function specOf(padName: string, change: Partial<PumpSpec> = {}): PumpSpec {
  const spec = listLarkmoorPumps().find((candidate) => candidate.padName === padName);
  if (spec === undefined) throw new Error(`no pad ${padName}`);
  return { ...spec, lived: false, stopWeekday: undefined, ...change };
}

/** A pump alone, without ordinary life, at `from`. */
export function makePump(spec: PumpSpec, from = MONDAY, seed = 'test', cadenceMs = 10_000): VirtualPump {
  return createVirtualPump(createPump(spec, createZone(spec.zoneName), seed, from), cadenceMs);
}

/** Plays a pump and gathers what its device tells. */
export function play(member: VirtualPump, until: number): News[] {
  const news: News[] = [];
  member.advance(until, (item) => news.push(item));
  return news;
}

/** The readings among what a device tells. */
export function readingsOf(news: readonly News[]) {
  return news.flatMap((item) => (item.kind === 'reading' ? [item.reading] : []));
}
