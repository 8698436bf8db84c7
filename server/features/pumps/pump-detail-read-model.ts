import { sql } from 'drizzle-orm';
import { epochMs } from '#server/db/epoch-ms.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import { type PumpRowData, pumpRowColumns, pumpRowFrom } from './pump-row-read-model.ts';

export type PumpDetailRow = PumpRowData & {
  readonly purpose: PumpDetail['purpose'];
  readonly street: string;
  readonly town: string | null;
  readonly technicianName: string | null;
  readonly motor: PumpDetail['motor'];
  readonly wetEndModel: string | null;
  readonly device: PumpDetail['device'];
  readonly learnt: unknown;
  readonly ownedFrom: number | null;
  readonly knownFrom: number;
  readonly otherPumps: PumpDetail['otherPumps'];
};

/** One pump with everything its page shows, if the person may see it. */
export async function findPumpDetailRow(db: Transaction, pumpId: string): Promise<PumpDetailRow | undefined> {
  const { rows } = await db.execute<PumpDetailRow>(sql`
    select ${pumpRowColumns}, p.purpose, pad.street, pad.town, technician.name as "technicianName",
      case when motor.id is not null then jsonb_build_object('model', model.name, 'serial', motor.serial,
        'frame', model.frame, 'totalHorsepower', model.total_horsepower, 'serviceFactor', model.service_factor,
        'installedAt', ${epochMs(sql`fitted.starts_at`)}) end as motor,
      wet.name as "wetEndModel",
      case when device.id is not null then jsonb_build_object('serial', device.serial, 'firmware', device.firmware,
        'state', device.state) end as device,
      learnt.learnt, ${epochMs(sql`owned.starts_at`)} as "ownedFrom",
      ${epochMs(sql`least(p.created_at, fitted.starts_at, reporting.starts_at)`)} as "knownFrom",
      (select coalesce(jsonb_agg(jsonb_build_object('id', other.id, 'name', other.name, 'monitored', other.monitored)
        order by other.number), '[]') from pumps other where other.pad_id = p.pad_id and other.id <> p.id) as "otherPumps"
    from ${pumpRowFrom(sql`pump_id = ${pumpId}`)}
    left join users technician on technician.id = pad.technician_id
    left join pump_learnt learnt on learnt.pump_id = p.id
    where p.id = ${pumpId}`);
  return rows[0];
}
