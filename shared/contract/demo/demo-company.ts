import type { MotorSettings, MotorTraits } from '#shared/domain/control/motor-settings.ts';
import type { Equipment, PadState, WetEndPoint, WiredInput } from '#shared/domain/control/pump-context.ts';
import type { Tariff } from '#shared/domain/energy/tariff.ts';

/** Plain data of an invented company: what its own people would have entered. The simulator adds the physics behind it. */
export type DemoCompany = {
  readonly name: string;
  /** IANA name of the company's zone. */
  readonly zone: string;
  readonly people: readonly DemoPerson[];
  readonly routes: readonly DemoRoute[];
  readonly customers: readonly DemoCustomer[];
  readonly motorModels: readonly DemoMotorModel[];
  readonly wetEndModels: readonly DemoWetEndModel[];
  readonly pads: readonly DemoPad[];
  /** What energy costs, and what the pumps used before. */
  readonly energy?: DemoEnergy;
};

/** A tariff with terms that name it by key; days are local, `YYYY-MM-DD`, the last term has no end. */
export type DemoEnergy = {
  readonly tariffs: readonly { readonly key: string; readonly tariff: Tariff }[];
  readonly companyTerms: readonly { readonly tariff: string; readonly from: string; readonly to: string | null }[];
  /** Pads with a plan of their own, by the pad's name. */
  readonly padTerms: readonly {
    readonly pad: string;
    readonly tariff: string;
    readonly from: string;
    readonly ownMeter: boolean;
    readonly otherKwhByPeriod: readonly number[];
  }[];
  readonly baselines: readonly DemoBaseline[];
  /** The grid whose emission factors are shown. */
  readonly carbonRegion: string;
};

/** What the pump under a device used before, as its plate or a clamp meter told. */
export type DemoBaseline = {
  readonly serial: string;
  readonly kind: 'clamped' | 'nameplate';
  readonly watts?: number;
  readonly sigmaWatts?: number;
  readonly horsepower?: number;
  readonly serviceFactor?: number;
  readonly basis: { readonly kind: 'same-hours' };
  readonly note: string;
};

/** Someone who signs in. `customer` is the key of a homeowner's customer. */
export type DemoPerson = {
  readonly email: string;
  readonly name: string;
  readonly role: 'manager' | 'technician' | 'homeowner';
  readonly phone: string;
  readonly customer?: string;
};

/** A route is an area and the technician (by e-mail) who drives it. */
export type DemoRoute = { readonly area: string; readonly technician: string };

export type DemoCustomer = {
  readonly key: string;
  readonly name: string;
  readonly email: string;
  readonly phone: string;
  /** The day they moved in, `YYYY-MM-DD` in the pad's zone: a homeowner sees nothing from before it. */
  readonly since: string;
};

export type DemoMotorModel = {
  readonly name: string;
  readonly frame: '48Y' | '56Y' | '56J' | '56C';
  readonly totalHorsepower: number;
  readonly serviceFactor: number;
  readonly traits: MotorTraits;
};

/** Curve points at the reference speed; watts at the motor's line terminals. */
export type DemoWetEndModel = {
  readonly name: string;
  readonly referenceRpm: number;
  readonly standbyWatts: number;
  readonly points: readonly WetEndPoint[];
};

export type DemoPad = {
  /** The street line, by which everyone calls the pad. */
  readonly name: string;
  readonly town: string;
  readonly area: string;
  readonly zone: string;
  readonly state: PadState;
  /** Key of the customer who owns it. */
  readonly customer: string;
  readonly accessNote: string;
  readonly poolGallons: number;
  readonly turnoversPerDay: number;
  /** The weekday of the route's stop, 1 = Monday to 7. */
  readonly stopWeekday: number;
  readonly pumps: readonly DemoPump[];
};

export type DemoPump = {
  /** Serial of the telemetry device: its MQTT client id. */
  readonly serial: string;
  readonly name: string;
  readonly purpose: 'filter' | 'booster' | 'spa' | 'feature';
  readonly motorModel: string;
  readonly motorSerial: string;
  /** Year and week of manufacture as on the plate, `YYYY-WW`. */
  readonly dateCode: string;
  /** `YYYY-MM-DD` in the pad's zone. */
  readonly installedOn: string;
  readonly warrantyUntil: string;
  readonly wetEndModel: string;
  readonly intervalSeconds: number;
  readonly nominalVolts: number;
  readonly settings: MotorSettings;
  readonly inputs: readonly WiredInput[];
  readonly equipment: readonly Equipment[];
  /** System curve found at start-up, ft per gpm². */
  readonly systemK: number;
};
