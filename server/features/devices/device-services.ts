/** What the verbs of devices need besides the context. */
export type DeviceServices = {
  /** The keyed hash under which a secret is stored. */
  readonly hashSecret: (secret: string) => Buffer;
};
