import { type SQL, sql } from 'drizzle-orm';
import type { MotorSettings, MotorTraits } from '#shared/domain/control/motor-settings.ts';
import { DEFAULT_TRAITS } from '#shared/domain/control/motor-settings.ts';
import type {
  Equipment,
  EquipmentKind,
  InputDuty,
  InputKind,
  Interlock,
  PadState,
  PumpContext,
  WetEndPoint,
  WiredInput,
} from '#shared/domain/control/pump-context.ts';
import type { DetectorParameters } from '#shared/domain/detectors/detector-parameters.ts';
import { createRuleBook, listRuleLayers } from './rule-layers.ts';
import type { Trippers } from './schema/clocks.ts';
import type { Transaction } from './transaction.ts';

/** A monitored pump as it is commissioned now, with the device that reports it. */
export type CommissionedPump = {
  readonly pumpId: string;
  readonly pumpNumber: number;
  readonly companyId: string;
  readonly padId: string;
  readonly device: { readonly id: string; readonly serial: string } | undefined;
  /** The model of the motor that is fitted now. */
  readonly modelId: string | null;
  readonly context: PumpContext;
  /** The rules that hold for it. */
  readonly rules: DetectorParameters;
};

type InputRow = {
  readonly number: number;
  readonly kind: InputKind;
  readonly drives: InputDuty | null;
  readonly clock: {
    readonly type: NonNullable<WiredInput['clockType']>;
    readonly circuit: 'motor' | 'own';
    readonly trippers: readonly Trippers[];
    readonly opensEarlyMinutes: number;
  } | null;
};

type EquipmentRow = {
  readonly kind: EquipmentKind;
  readonly input: number | null;
  readonly minimumGpm: number | null;
  readonly interlock: Interlock;
};

/** What one pump's commissioning is read as; the same columns serve the fold and the screens. */
export type CommissionedRow = {
  readonly pumpId: string;
  readonly pumpNumber: number;
  readonly companyId: string;
  readonly padId: string;
  /** The model of the motor that is fitted now. */
  readonly modelId: string | null;
  readonly zone: string;
  readonly area: string | null;
  readonly padState: PadState;
  readonly poolGallons: number | null;
  readonly turnoversPerDay: number | null;
  readonly settings: MotorSettings;
  readonly systemK: number | null;
  readonly traits: MotorTraits | null;
  readonly nominalVolts: number | null;
  readonly wetEnd: { referenceRpm: number; points: readonly WetEndPoint[]; standbyWatts: number } | null;
  readonly deviceId: string | null;
  readonly serial: string | null;
  readonly intervalSeconds: number | null;
  readonly inputs: readonly InputRow[];
  readonly equipment: readonly EquipmentRow[];
};

/** A pump without a device is judged by the usual interval. */
const USUAL_INTERVAL_SECONDS = 10;

const inputsColumn = sql`
  (select coalesce(jsonb_agg(jsonb_build_object('number', i.number, 'kind', i.kind, 'drives', i.drives,
      'clock', case when c.id is not null then jsonb_build_object('type', c.type, 'circuit', c.circuit,
        'trippers', c.trippers, 'opensEarlyMinutes', c.opens_early_minutes) end) order by i.number), '[]')
    from inputs i left join clocks c on c.id = i.clock_id where i.pump_id = p.id) as inputs`;

const equipmentColumn = sql`
  (select coalesce(jsonb_agg(jsonb_build_object('kind', e.kind, 'input', e.input_number,
      'minimumGpm', e.minimum_gpm, 'interlock', e.interlock) order by e.kind, e.id), '[]')
    from equipment e where e.pad_id = p.pad_id
      and (e.pump_id = p.id or e.pump_id is null and p.purpose = 'filter')) as equipment`;

/** Columns of CommissionedRow, for a query that selects from `commissionedFrom`. */
export const commissionedColumns = sql`
  p.id as "pumpId", p.number as "pumpNumber", p.company_id as "companyId", p.pad_id as "padId",
  motor.model_id as "modelId",
  pad.zone, pad.area, pad.state as "padState", pad.pool_gallons as "poolGallons",
  case when p.purpose = 'filter' then pad.turnovers_per_day end as "turnoversPerDay", p.settings, p.system_k as "systemK",
  model.traits, coalesce(p.nominal_volts, model.nominal_volts) as "nominalVolts",
  case when wet.id is not null then jsonb_build_object('referenceRpm', wet.reference_rpm, 'points', wet.points,
    'standbyWatts', wet.standby_watts) end as "wetEnd",
  device.id as "deviceId", device.serial, device.interval_seconds as "intervalSeconds",
  ${inputsColumn}, ${equipmentColumn}`;

/** Pumps with their pad and with the motor and the device that are fitted now. */
export const commissionedFrom = sql`
  pumps p join pads pad on pad.id = p.pad_id
  left join motor_fittings fitted on fitted.pump_id = p.id
    and fitted.starts_at <= now() and (fitted.ends_at is null or fitted.ends_at > now())
  left join motors motor on motor.id = fitted.motor_id
  left join motor_models model on model.id = motor.model_id
  left join wet_end_models wet on wet.id = p.wet_end_model_id
  left join device_fittings reporting on reporting.pump_id = p.id
    and reporting.starts_at <= now() and (reporting.ends_at is null or reporting.ends_at > now())
  left join devices device on device.id = reporting.device_id`;

/** Monitored pumps as commissioned now: all of them, or those asked for. */
export async function listCommissionedPumps(
  db: Pick<Transaction, 'execute'>,
  pumpIds?: readonly string[],
): Promise<CommissionedPump[]> {
  const which: SQL = pumpIds === undefined ? sql`true` : sql`p.id = any(${sql.param(pumpIds)}::uuid[])`;
  const { rows } = await db.execute<CommissionedRow>(
    sql`select ${commissionedColumns} from ${commissionedFrom} where p.monitored and ${which} order by p.number`,
  );
  const rulesOf = createRuleBook(await listRuleLayers(db));
  return rows.map((row) => ({
    pumpId: row.pumpId,
    pumpNumber: row.pumpNumber,
    companyId: row.companyId,
    padId: row.padId,
    modelId: row.modelId,
    device: row.deviceId === null || row.serial === null ? undefined : { id: row.deviceId, serial: row.serial },
    context: toPumpContext(row),
    rules: rulesOf(row),
  }));
}

/** The domain's context of a pump; what is not recorded is left out. */
export function toPumpContext(row: CommissionedRow): PumpContext {
  return {
    pumpId: row.pumpId,
    zone: row.zone,
    area: row.area ?? undefined,
    padState: row.padState,
    intervalSeconds: row.intervalSeconds ?? USUAL_INTERVAL_SECONDS,
    settings: row.settings,
    traits: row.traits ?? DEFAULT_TRAITS,
    inputs: row.inputs.map(toWiredInput),
    equipment: row.equipment.map(toEquipment),
    wetEnd: row.wetEnd ?? undefined,
    systemK: row.systemK ?? undefined,
    poolGallons: row.poolGallons ?? undefined,
    turnoversPerDay: row.turnoversPerDay ?? undefined,
    nominalVolts: row.nominalVolts ?? undefined,
  };
}

function toWiredInput({ number, kind, drives, clock }: InputRow): WiredInput {
  const windows = (clock?.trippers ?? []).map((pair) => ({
    ...pair,
    opensEarlyMinutes: clock?.opensEarlyMinutes ?? 0,
  }));
  return {
    number,
    kind,
    windows,
    ...(drives === null ? {} : { drives }),
    ...(clock === null ? {} : { circuit: clock.circuit, clockType: clock.type }),
  };
}

const toEquipment = ({ kind, input, minimumGpm, interlock }: EquipmentRow): Equipment => ({
  kind,
  interlock,
  ...(input === null ? {} : { input }),
  ...(minimumGpm === null ? {} : { minimumGpm }),
});
