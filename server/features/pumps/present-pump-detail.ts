import type { Actor } from '#server/context.ts';
import { toPumpContext } from '#server/db/commissioned-pumps.ts';
import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import { createLearnedBands } from '#shared/domain/detectors/load/learned-bands.ts';
import { presentPumpRow } from './present-pump-row.ts';
import type { PumpDetailRow } from './pump-detail-read-model.ts';

export function presentPumpDetail(row: PumpDetailRow, actor: Pick<Actor, 'role'>): PumpDetail {
  const { equipment } = toPumpContext(row);
  return {
    ...presentPumpRow(row, actor),
    purpose: row.purpose,
    street: row.town === null ? row.street : `${row.street}, ${row.town}`,
    equipment: equipment.map((one) => ({ ...one })),
    poolGallons: row.poolGallons,
    turnoversPerDay: row.turnoversPerDay,
    technicianName: row.technicianName,
    motor: row.motor,
    wetEndModel: row.wetEndModel,
    device: row.device,
    nominalVolts: row.nominalVolts,
    learning: !hasValidBand(row.learnt),
    visibleFrom: actor.role === 'homeowner' ? (row.ownedFrom ?? row.knownFrom) : row.knownFrom,
    otherPumps: row.otherPumps,
  };
}

/** Whether the pump has run long enough at some speed for its usual watts to be known. */
function hasValidBand(learnt: unknown): boolean {
  return createLearnedBands(findBands(learnt))
    .list()
    .some(({ valid }) => valid);
}

/** Where the fold keeps its bands in what it has learnt. */
function findBands(learnt: unknown): unknown {
  const load = isRecord(learnt) ? learnt.load : undefined;
  return isRecord(load) ? load.bands : undefined;
}

const isRecord = (value: unknown): value is Readonly<Record<string, unknown>> =>
  typeof value === 'object' && value !== null;
