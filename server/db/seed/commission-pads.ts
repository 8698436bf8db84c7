import { newId } from '#server/db/new-id.ts';
import { padOwnerships } from '#server/db/schema/pad-ownerships.ts';
import { pads } from '#server/db/schema/pads.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { DemoCompany, DemoPad } from '#shared/contract/demo/demo-company.ts';
import { commissionPump } from './commission-pump.ts';
import { type CommissionedDevice, type Commissioning, idOf } from './commissioning.ts';
import { startOfLocalDay } from './local-day.ts';

/** Writes the pads of a company with their owners, pumps and devices. */
export async function commissionPads(
  db: Transaction,
  company: DemoCompany,
  made: Commissioning,
): Promise<{ padIds: Map<string, string>; pumps: CommissionedDevice[] }> {
  const padIds = new Map<string, string>();
  const pumps: CommissionedDevice[] = [];
  for (const pad of company.pads) {
    const padId = await insertPad(db, company, pad, made);
    padIds.set(pad.name, padId);
    for (const pump of pad.pumps) pumps.push(await commissionPump(db, { pad, padId, pump }, made));
  }
  return { padIds, pumps };
}

async function insertPad(db: Transaction, company: DemoCompany, pad: DemoPad, made: Commissioning): Promise<string> {
  const { companyId } = made;
  const id = newId();
  const route = company.routes.find(({ area }) => area === pad.area);
  const customer = company.customers.find(({ key }) => key === pad.customer);
  await db.insert(pads).values({
    id,
    companyId,
    name: pad.name,
    street: pad.name,
    town: pad.town,
    area: pad.area,
    zone: pad.zone,
    state: pad.state,
    accessNotes: pad.accessNote,
    poolGallons: pad.poolGallons,
    turnoversPerDay: pad.turnoversPerDay,
    technicianId: route === undefined ? null : idOf(made.userIds, route.technician),
    stopWeekday: pad.stopWeekday,
  });
  if (customer === undefined) return id;
  await db.insert(padOwnerships).values({
    id: newId(),
    companyId,
    padId: id,
    customerId: idOf(made.customerIds, customer.key),
    startsAt: startOfLocalDay(pad.zone, customer.since),
  });
  return id;
}
