import { newId } from '#server/db/new-id.ts';
import { companies } from '#server/db/schema/companies.ts';
import { customers } from '#server/db/schema/customers.ts';
import { motorModels } from '#server/db/schema/motor-models.ts';
import { users } from '#server/db/schema/users.ts';
import { wetEndModels } from '#server/db/schema/wet-end-models.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { DemoCompany } from '#shared/contract/demo/demo-company.ts';
import { commissionEnergy } from './commission-energy.ts';
import { commissionPads } from './commission-pads.ts';
import type { CommissionedDevice } from './commissioning.ts';

/** What was made, by the names its data use. */
export type CommissionedCompany = {
  readonly companyId: string;
  readonly userIds: ReadonlyMap<string, string>;
  readonly customerIds: ReadonlyMap<string, string>;
  readonly padIds: ReadonlyMap<string, string>;
  readonly pumps: readonly CommissionedDevice[];
};

export type CommissionOptions = {
  readonly hashPassword: () => Promise<string>;
  readonly hashSecret: (secret: string) => Buffer;
};

const WORKING_HOURS = { days: Array.from({ length: 7 }, () => true), fromMinute: 7 * 60, toMinute: 19 * 60 };

/** Writes a whole company as its data say, in the transaction of the machine role that it is given. */
export async function commissionCompany(
  db: Transaction,
  company: DemoCompany,
  options: CommissionOptions,
): Promise<CommissionedCompany> {
  const companyId = newId();
  const manager = company.people.find((person) => person.role === 'manager');
  await db.insert(companies).values({
    id: companyId,
    name: company.name,
    zone: company.zone,
    phone: manager?.phone ?? null,
    mailHours: WORKING_HOURS,
  });
  const customerIds = await insertCustomers(db, companyId, company);
  const userIds = await insertPeople(db, companyId, company, customerIds, options);
  const models = await insertModels(db, companyId, company);
  const { padIds, pumps } = await commissionPads(db, company, {
    companyId,
    customerIds,
    userIds,
    ...models,
    hashSecret: options.hashSecret,
  });
  if (company.energy !== undefined) await commissionEnergy(db, company.energy, { companyId, padIds, pumps });
  return { companyId, userIds, customerIds, padIds, pumps };
}

async function insertCustomers(db: Transaction, companyId: string, company: DemoCompany): Promise<Map<string, string>> {
  const ids = new Map(company.customers.map(({ key }) => [key, newId()]));
  const rows = company.customers.map(({ key, name, email, phone }) => ({
    id: ids.get(key) ?? newId(),
    companyId,
    name,
    email,
    phone,
  }));
  if (rows.length > 0) await db.insert(customers).values(rows);
  return ids;
}

async function insertPeople(
  db: Transaction,
  companyId: string,
  company: DemoCompany,
  customerIds: ReadonlyMap<string, string>,
  { hashPassword }: CommissionOptions,
): Promise<Map<string, string>> {
  const ids = new Map<string, string>();
  for (const { email, name, phone, role, customer } of company.people) {
    const id = newId();
    const customerId = customer === undefined ? null : (customerIds.get(customer) ?? null);
    const passwordHash = await hashPassword();
    await db.insert(users).values({ id, companyId, email, name, phone, role, customerId, passwordHash });
    ids.set(email, id);
  }
  return ids;
}

async function insertModels(db: Transaction, companyId: string, company: DemoCompany) {
  const motorModelIds = new Map<string, string>();
  const wetEndModelIds = new Map<string, string>();
  for (const { name, frame, totalHorsepower, serviceFactor, traits } of company.motorModels) {
    const id = newId();
    const { inputCount } = traits;
    const terminalOrder = Array.from({ length: inputCount }, (_, index) => index + 1);
    await db
      .insert(motorModels)
      .values({ id, companyId, name, frame, totalHorsepower, serviceFactor, inputCount, terminalOrder, traits });
    motorModelIds.set(name, id);
  }
  for (const { name, referenceRpm, standbyWatts, points } of company.wetEndModels) {
    const id = newId();
    await db.insert(wetEndModels).values({ id, companyId, name, referenceRpm, standbyWatts, points });
    wetEndModelIds.set(name, id);
  }
  return { motorModelIds, wetEndModelIds };
}
