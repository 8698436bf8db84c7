import { randomBytes } from 'node:crypto';
import type pg from 'pg';
import { hashDeviceSecret } from '#server/broker/device-credential.ts';
import { commissionCompany } from '#server/db/seed/commission-company.ts';
import type { CommissionedDevice } from '#server/db/seed/commissioning.ts';
import { asMachine, type Sight } from '#server/db/transaction.ts';
import { hashPassword } from '#server/features/session/index.ts';
import type { DemoCompany, DemoPad, DemoPump } from '#shared/contract/demo/demo-company.ts';
import type { Role } from '#shared/contract/primitives.ts';
import { DEFAULT_TRAITS } from '#shared/domain/control/motor-settings.ts';

export const TEST_PASSWORD = 'correct horse battery';
export const TEST_DEVICE_KEY = 'device-key-only-for-tests-0123456789abcdef';

export type TestPerson = { readonly userId: string; readonly email: string; readonly sight: Sight };

/** A tenant of a test's own: nothing in it collides with what other tests make in the same database. */
export type TestCompany = {
  readonly companyId: string;
  readonly manager: TestPerson;
  readonly technician: TestPerson;
  /** Owns the first pad. */
  readonly homeowner: TestPerson;
  /** Owns the second pad. */
  readonly neighbour: TestPerson;
  readonly padIds: readonly string[];
  /** Two pumps on the first pad, one on each other. */
  readonly pumps: readonly CommissionedDevice[];
};

const EVERY_DAY = [true, true, true, true, true, true, true];

const pumpOf = (mark: string, number: number, name: string): DemoPump => ({
  serial: `T${mark}-${String(number).padStart(4, '0')}`,
  name,
  purpose: name === 'Booster' ? 'booster' : 'filter',
  motorModel: 'Three inputs',
  motorSerial: `M${mark}-${number}`,
  dateCode: '2024-10',
  installedOn: '2024-05-01',
  warrantyUntil: '2027-05-01',
  wetEndModel: 'Wet end',
  intervalSeconds: 10,
  nominalVolts: 230,
  settings: {
    inputs: [2850, 2400, null],
    program: [{ days: EVERY_DAY, fromMinute: 480, toMinute: 1080, rpm: 1700 }],
    prime: { rpm: 3450, seconds: 60 },
    timed: null,
    freeze: { celsius: 4, rpm: 1000 },
    maxRpm: 3450,
    minRpm: 600,
  },
  inputs: [
    {
      number: 1,
      kind: 'clock',
      windows: [{ days: EVERY_DAY, onMinute: 540, offMinute: 660, opensEarlyMinutes: 20 }],
      drives: 'cleaner',
      circuit: 'own',
      clockType: 'synchronous',
    },
  ],
  equipment: [{ kind: 'heater', minimumGpm: 30, interlock: 'flow-switch', input: 1 }],
  systemK: 0.012,
});

const padOf = (mark: string, index: number, pumps: readonly DemoPump[]): DemoPad => ({
  name: `Pad ${String.fromCharCode(65 + (index % 26))}${index < 26 ? '' : index} ${mark}`,
  town: 'Testham',
  area: index % 2 === 0 ? 'North' : 'South',
  zone: index % 2 === 0 ? 'America/Los_Angeles' : 'Europe/Berlin',
  state: 'open',
  customer: index === 0 ? 'owner' : 'neighbour',
  accessNote: `gate ${mark}`,
  poolGallons: 18_000,
  turnoversPerDay: 1,
  stopWeekday: 2,
  pumps,
});

function describeCompany(mark: string, padCount: number): DemoCompany {
  const emailOf = (name: string) => `${name}-${mark}@company.example`.toLowerCase();
  const person = (name: string, role: Role, customer?: string) => ({
    email: emailOf(name),
    name: `${name} ${mark}`,
    role,
    phone: '+1 555 555 0100',
    ...(customer === undefined ? {} : { customer }),
  });
  return {
    name: `Company ${mark}`,
    zone: 'America/Los_Angeles',
    people: [
      person('Manager', 'manager'),
      person('Technician', 'technician'),
      person('Homeowner', 'homeowner', 'owner'),
      person('Neighbour', 'homeowner', 'neighbour'),
    ],
    routes: [
      { area: 'North', technician: emailOf('Technician') },
      { area: 'South', technician: emailOf('Technician') },
    ],
    customers: ['owner', 'neighbour'].map((key) => ({
      key,
      name: `Customer ${key} ${mark}`,
      email: emailOf(key),
      phone: '+1 555 555 0199',
      since: '2024-05-01',
    })),
    motorModels: [
      { name: 'Three inputs', frame: '56Y', totalHorsepower: 1.65, serviceFactor: 1.1, traits: DEFAULT_TRAITS },
    ],
    wetEndModels: [
      {
        name: 'Wet end',
        referenceRpm: 3450,
        standbyWatts: 8,
        points: [
          { gpm: 0, feet: 84, watts: 820 },
          { gpm: 32, feet: 81, watts: 1260 },
          { gpm: 62, feet: 71, watts: 1610 },
          { gpm: 102, feet: 48, watts: 1770 },
        ],
      },
    ],
    pads: Array.from({ length: padCount }, (_, index) => {
      const filter = pumpOf(mark, index * 2, 'Filter pump');
      return padOf(mark, index, index === 0 ? [filter, pumpOf(mark, 1, 'Booster')] : [filter]);
    }),
  };
}

/** Makes a company with a manager, a technician, two homeowners and some pads. */
export async function makeTestCompany(machine: pg.Pool, { pads = 2 } = {}): Promise<TestCompany> {
  const mark = randomBytes(5).toString('hex').toUpperCase();
  const company = describeCompany(mark, pads);
  const made = await asMachine(machine, (db) =>
    commissionCompany(db, company, {
      hashPassword: () => hashPassword(TEST_PASSWORD),
      hashSecret: (secret) => hashDeviceSecret(TEST_DEVICE_KEY, secret),
    }),
  );
  const personOf = (email: string): TestPerson => {
    const { role, customer } = company.people.find((person) => person.email === email)!;
    const userId = made.userIds.get(email)!;
    const customerId = customer === undefined ? undefined : made.customerIds.get(customer)!;
    return { userId, email, sight: { companyId: made.companyId, userId, role, customerId } };
  };
  const [manager, technician, homeowner, neighbour] = company.people.map(({ email }) => personOf(email));
  return {
    companyId: made.companyId,
    manager: manager!,
    technician: technician!,
    homeowner: homeowner!,
    neighbour: neighbour!,
    padIds: [...made.padIds.values()],
    pumps: made.pumps,
  };
}
