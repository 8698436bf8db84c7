import type { Context } from '#server/context.ts';
import { epochDayOf, previousMonth } from '#server/db/day-text.ts';
import { decodeCursor, toPage } from '#server/http/page-cursor.ts';
import type { PadMonth, PadMonthQuery } from '#shared/contract/http/energy-fleet.ts';
import { toMinorUnits } from '#shared/domain/energy/money.ts';
import { formatMinor } from '#shared/domain/energy/money-text.ts';
import { localDayAt } from '#shared/domain/time/local-days.ts';
import { monthWindow } from './energy-window.ts';
import { findCompanyZone } from './fleet-month-read-model.ts';
import { ENOUGH_FLOW, LEAST_GALLONS, listPadMonths, type PadMonthRow } from './pad-month-read-model.ts';

const DAY_MS = 86_400_000;

/** A month pad by pad. */
export async function listPadEnergy({ db, actor, now }: Context, query: PadMonthQuery) {
  const after = decodeCursor(query.cursor, ['number', 'string', 'string']);
  const zone = await findCompanyZone(db, actor.companyId);
  const window = monthWindow(query.month, zone, now);
  const first = epochDayOf(window.from);
  const passed = Math.min(epochDayOf(window.until), (localDayAt(zone, now)?.epochDay ?? first) + 1) - first;
  const months = {
    companyId: actor.companyId,
    month: window.from,
    before: previousMonth(window.from),
    days: Math.max(passed, 0),
  };
  const { rows, matching } = await listPadMonths(db, months, query, after);
  const { items, nextCursor } = toPage(rows, query.limit, ({ rank, padName, padId }) => [rank, padName, padId]);
  return {
    items: items.map(present),
    nextCursor,
    matching,
    month: window.from.slice(0, 7),
    serverNow: now,
  };
}

function present(row: PadMonthRow): PadMonth {
  const { currency, costMinor, savedMicros, gallons, poolGallons, spanMs } = row;
  const savedUnits = currency === null || savedMicros === null ? undefined : toMinorUnits(savedMicros, currency);
  const isFlowKnown = gallons > 0 && row.flowKnownMs >= ENOUGH_FLOW * row.onMs;
  const days = spanMs / Math.max(1, row.pumps) / DAY_MS;
  return {
    padId: row.padId,
    padName: row.padName,
    customerName: row.customerName,
    area: row.area,
    pumps: row.pumps,
    kwh: row.wattHours / 1000,
    currency,
    cost: currency === null || costMinor === null ? null : formatMinor(costMinor, currency),
    previousKwh: row.previousWattHours === null ? null : row.previousWattHours / 1000,
    gallons: gallons > 0 ? gallons : null,
    kwhPerThousandGallons: isFlowKnown && gallons >= LEAST_GALLONS ? row.wattHours / gallons : null,
    turnoversPerDay: isFlowKnown && poolGallons !== null && days > 0 ? gallons / poolGallons / days : null,
    wantedTurnoversPerDay: row.turnoversPerDay,
    savedKwh: row.savedKwh,
    saved: currency === null || savedUnits === undefined ? null : formatMinor(savedUnits, currency),
    coverage: spanMs > 0 ? Math.min(1, row.coveredMs / spanMs) : 0,
  };
}
