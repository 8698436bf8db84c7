import type pg from 'pg';
import { listGroupPlaces } from './group-places-repository.ts';
import type { MailPlace } from './mail-place.ts';
import { listMailPlaces } from './mail-places-repository.ts';

type Placed = { readonly alarmId: string; readonly pumpId: string | null };

/** Where some alarms are and who answers for them, by the pump's id, or by the alarm's where it speaks for several. */
export async function listAlarmPlaces(
  client: Pick<pg.ClientBase, 'query'>,
  alarms: readonly Placed[],
): Promise<Map<string, MailPlace>> {
  const pumpIds = new Set(alarms.flatMap(({ pumpId }) => pumpId ?? []));
  const groupIds = alarms.filter(({ pumpId }) => pumpId === null).map(({ alarmId }) => alarmId);
  const ofPumps = await listMailPlaces(client, [...pumpIds]);
  return new Map([...ofPumps, ...(await listGroupPlaces(client, groupIds))]);
}

/** The key of an alarm's place. */
export const placeKey = ({ alarmId, pumpId }: Placed): string => pumpId ?? alarmId;
