import { alarmNews } from '#src/features/alarms/alarm-socket.ts';
import { fleetNews } from '#src/features/fleet/fleet-socket.ts';
import { pumpNews } from '#src/features/pumps/pump-socket.ts';
import type { LiveTable } from '#src/lib/live/live-table.ts';

/** Every feature that hears news. */
export const LIVE_TABLES: readonly LiveTable[] = [pumpNews, fleetNews, alarmNews];
