/** What ingest and the broker have to know of a device. */
export type KnownDevice = {
  readonly serial: string;
  readonly deviceId: string;
  readonly companyId: string;
  /** The keyed hash of its secret; undefined = revoked, or never given. */
  readonly secretHash: Buffer | undefined;
  /** The pump it is fitted to now, with the number of inputs of that pump's motor; undefined = none. */
  readonly pump: { readonly id: string; readonly number: number; readonly inputCount: number } | undefined;
};
