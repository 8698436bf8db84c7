import type { UnitSystem } from '#shared/units/unit-system.ts';
import type { MessageCatalogue } from './explain-messages.data.ts';
import type { PumpContext } from './pump-context.ts';

/** Who is told: a technician hears inputs and entries by number, a homeowner what happens in their garden. */
export type Voice = 'homeowner' | 'technician';

export type ExplainOptions = {
  readonly voice: Voice;
  /** Times as 9:30 PM, or as 21:30. */
  readonly hour12: boolean;
  /** BCP 47, for the separators of figures. */
  readonly locale: string;
  readonly system?: UnitSystem | undefined;
  /** The sentences; English without it. */
  readonly messages?: MessageCatalogue | undefined;
};

/** What an explanation needs to know of the pump. */
export type ExplainContext = Pick<PumpContext, 'zone' | 'settings' | 'traits' | 'inputs'>;
