import { presentLikely } from '#server/features/alarms/present-likely.ts';
import type { DemoPad, DemoPump } from '#shared/contract/demo/demo-company.ts';
import { LARKMOOR } from '#shared/contract/demo/larkmoor.data.ts';
import type { Alarm, AlarmDetail } from '#shared/contract/http/alarms.ts';
import type { PumpDetail, PumpNow } from '#shared/contract/http/pumps.ts';
import type { Run } from '#shared/contract/http/runs.ts';
import { explainAlarm } from '#shared/domain/causes/explain-alarm.ts';
import type { PlannedRun } from '#shared/domain/control/plan.ts';
import { DAY_MS, HOUR_MS } from '#shared/domain/time/local-time.ts';
import { nextWeekday } from '#shared/domain/time/next-weekday.ts';
import { FAKE_FAULTS, type FakeFault } from './fake-faults.data.ts';
import { fakeId } from './fake-id.ts';
import { planFakePump, runFakePump } from './fake-runs.ts';

export type FakePump = {
  detail: PumpDetail;
  readonly customer: string;
  readonly planned: readonly PlannedRun[];
  runs: Run[];
  alarm: AlarmDetail | undefined;
};

const nameOf = (key: string) => LARKMOOR.customers.find((customer) => customer.key === key)?.name ?? null;

const modelOf = (pump: DemoPump) => {
  const model = LARKMOOR.motorModels.find(({ name }) => name === pump.motorModel);
  if (model === undefined) throw new Error(`no motor model ${pump.motorModel}`);
  return model;
};

const technicianOf = (area: string) => {
  const email = LARKMOOR.routes.find((route) => route.area === area)?.technician;
  return LARKMOOR.people.find((person) => person.email === email)?.name ?? null;
};

function alarmOf(fault: FakeFault, number: number, detail: PumpDetail, now: number): AlarmDetail {
  const from = now - fault.hoursAgo * HOUR_MS;
  const acknowledgedAt = fault.acknowledged === true ? from + HOUR_MS : null;
  return {
    id: fakeId('alarm', number),
    pumpId: detail.pumpId,
    padId: detail.padId,
    padName: detail.padName,
    pumpName: detail.pumpName,
    customerName: detail.customerName,
    area: detail.area,
    zone: detail.zone,
    detector: fault.detector,
    alarmClass: fault.alarmClass,
    priority: fault.priority,
    state: acknowledgedAt === null ? 'unacknowledged' : 'acknowledged',
    cause: fault.cause,
    evidence: { ...fault.evidence },
    from,
    raisedAt: from + 4 * 60_000,
    returnedAt: null,
    count: 1,
    acknowledgedAt,
    acknowledgedBy: acknowledgedAt === null ? null : 'Ilse Ravn',
    acknowledgementNote: null,
    escalatedAt: null,
    shelvedUntil: null,
    shelvedBy: null,
    shelvedReason: null,
    suppressed: false,
    suppressedBy: null,
    outOfService: false,
    outOfServiceSince: null,
    answer: null,
    done: null,
    assignedTo: null,
    group: null,
    coveredBy: null,
    members: [],
    technicianName: detail.technicianName,
    nextStopOn: nextWeekday(detail.zone, 4, now) ?? null,
    likely: presentLikely(explainAlarm({ ...fault, from }, detail.zone)),
    version: 1,
    transitions: [
      {
        at: from + 4 * 60_000,
        kind: 'raised',
        by: null,
        note: null,
        priority: fault.priority,
        cause: fault.cause,
        evidence: { ...fault.evidence },
      },
    ],
    mails: [
      {
        to: 'tech@larkmoor.example',
        subject: `${detail.padName}`,
        queuedAt: from + 4 * 60_000,
        sentAt: from + 5 * 60_000,
        attempts: 1,
      },
    ],
    serverNow: now,
  };
}

export const markOf = (alarm: Alarm | undefined): PumpDetail['alarm'] =>
  alarm === undefined
    ? null
    : {
        id: alarm.id,
        detector: alarm.detector,
        cause: alarm.cause,
        evidence: alarm.evidence,
        priority: alarm.priority,
        acknowledged: alarm.acknowledgedAt !== null,
        from: alarm.from,
        open: 1,
      };

function nowOf(run: Run, planned: readonly PlannedRun[], now: number): PumpNow {
  const current = planned.find(({ from, to }) => from <= now && now < to);
  return {
    at: now - 4000,
    rpm: run.meanRpm,
    watts: run.meanWatts,
    closedInputs: run.closedInputs,
    activeInput: run.activeInput,
    source: run.source,
    expectedSource: run.expectedSource,
    expectedRpm: run.expectedRpm,
    until: current?.to ?? null,
    lockedBy: run.activeInput === 0 ? null : run.activeInput,
    primed: !run.flags.includes('unprimed'),
    flow: { gpm: run.meanRpm / 55, sigmaGpm: run.meanRpm / 550 },
    because: {
      ...(run.expectedSource === 'input'
        ? { kind: 'input', input: run.activeInput, others: [] }
        : (current?.because ?? { kind: 'unknown' })),
    },
  };
}

/** Laying out a program is dear: copies of a pad share one plan. */
function planOnce(pad: DemoPad, pump: DemoPump, now: number): readonly PlannedRun[] {
  const key = `${pump.serial} ${now}`;
  const planned = plans.get(key) ?? planFakePump(pad, pump, modelOf(pump), now - 9 * DAY_MS, now + 2 * DAY_MS);
  plans.set(key, planned);
  return planned;
}

const plans = new Map<string, readonly PlannedRun[]>();

function buildPump(
  pad: DemoPad,
  pump: DemoPump,
  padNumber: number,
  number: number,
  copy: number,
  now: number,
): FakePump {
  const model = modelOf(pump);
  const fault = copy === 0 ? FAKE_FAULTS.find(({ serial }) => serial === pump.serial) : undefined;
  const planned = planOnce(pad, pump, now);
  const runs = runFakePump(planned, fault, now);
  const open = runs.at(-1);
  const silent = fault?.runs === 'silent';
  const detail: PumpDetail = {
    pumpId: fakeId('pump', number),
    padId: fakeId('pad', padNumber),
    padName: copy === 0 ? pad.name : `${pad.name}-${copy}`,
    pumpName: pump.name,
    customerName: nameOf(pad.customer),
    area: pad.area,
    zone: pad.zone,
    padState: pad.state,
    serial: pump.serial,
    motorModel: pump.motorModel,
    intervalSeconds: pump.intervalSeconds,
    settings: {
      ...pump.settings,
      inputs: [...pump.settings.inputs],
      program: pump.settings.program.map((entry) => ({ ...entry, days: [...entry.days] })),
    },
    traits: { ...model.traits, precedence: [...model.traits.precedence] },
    inputs: pump.inputs.map((input) => ({
      ...input,
      windows: input.windows.map((window) => ({ ...window, days: [...window.days] })),
    })),
    now: open === undefined || silent ? null : nowOf(open, planned, now),
    heardAt: silent ? now - 10.2 * HOUR_MS : now - 4000,
    silentSince: silent ? now - 10.2 * HOUR_MS : null,
    alarm: null,
    purpose: pump.purpose,
    street: pad.name,
    equipment: pump.equipment.map((each) => ({ ...each })),
    poolGallons: pad.poolGallons,
    turnoversPerDay: pad.turnoversPerDay,
    technicianName: technicianOf(pad.area),
    motor: {
      model: model.name,
      serial: pump.motorSerial,
      frame: model.frame,
      totalHorsepower: model.totalHorsepower,
      serviceFactor: model.serviceFactor,
      installedAt: Date.parse(pump.installedOn),
    },
    wetEndModel: pump.wetEndModel,
    device: { serial: pump.serial, firmware: '1.4.2', state: silent ? 'lost' : 'online' },
    nominalVolts: pump.nominalVolts,
    learning: false,
    visibleFrom: now - 30 * DAY_MS,
    otherPumps: [],
  };
  const alarm = fault === undefined ? undefined : alarmOf(fault, number, detail, now);
  return { detail: { ...detail, alarm: markOf(alarm) }, customer: pad.customer, planned, runs, alarm };
}

/** Larkmoor's pumps as they stand at `now`; `size` beyond its 36 repeats the pads under other house numbers. */
export function createFakeFleet(now: number, size = 36): FakePump[] {
  const pumps: FakePump[] = [];
  for (let copy = 0; pumps.length < size; copy += 1) {
    LARKMOOR.pads.forEach((pad, padIndex) => {
      for (const pump of pad.pumps) {
        if (pumps.length >= size) return;
        pumps.push(buildPump(pad, pump, padIndex + 1 + copy * LARKMOOR.pads.length, pumps.length + 1, copy, now));
      }
    });
  }
  return pumps;
}
