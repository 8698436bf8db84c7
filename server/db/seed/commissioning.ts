/** A device that was made, with the only copy of its secret. */
export type CommissionedDevice = {
  readonly pumpId: string;
  readonly deviceId: string;
  readonly serial: string;
  readonly secret: string;
};

/** Ids of what was written before, by the names the data use. */
export type Commissioning = {
  readonly companyId: string;
  readonly customerIds: ReadonlyMap<string, string>;
  readonly userIds: ReadonlyMap<string, string>;
  readonly motorModelIds: ReadonlyMap<string, string>;
  readonly wetEndModelIds: ReadonlyMap<string, string>;
  readonly hashSecret: (secret: string) => Buffer;
};

/** The id of a thing the data name; a name that nothing bears is a fault of the data. */
export function idOf(ids: ReadonlyMap<string, string>, name: string): string {
  const id = ids.get(name);
  if (id === undefined) throw new Error(`The company's data name "${name}", which is not among them`);
  return id;
}
