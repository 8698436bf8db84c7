import type { Actor } from '#server/context.ts';
import { toPumpContext } from '#server/db/commissioned-pumps.ts';
import type { PumpRow } from '#shared/contract/http/pumps.ts';
import { presentPumpLive } from './present-pump-live.ts';
import type { PumpRowData } from './pump-row-read-model.ts';

/** A homeowner knows their own name; it is left out, as are other owners'. */
export function presentPumpRow(row: PumpRowData, { role }: Pick<Actor, 'role'>): PumpRow {
  const context = toPumpContext(row);
  return {
    ...presentPumpLive(row),
    padId: row.padId,
    padName: row.padName,
    pumpName: row.pumpName,
    customerName: role === 'homeowner' ? null : row.customerName,
    area: row.area,
    zone: row.zone,
    padState: row.padState,
    serial: row.serial,
    motorModel: row.motorModel,
    intervalSeconds: context.intervalSeconds,
    ...presentControl(context),
  };
}

type Context = ReturnType<typeof toPumpContext>;

/** Settings, traits and wiring in the contract's shapes: the domain's, field for field, in lists of their own. */
export function presentControl({ settings, traits, inputs }: Context): Pick<PumpRow, 'settings' | 'traits' | 'inputs'> {
  const program = settings.program.map((entry) => ({ ...entry, days: [...entry.days] }));
  const windowsOf = ({ windows }: Context['inputs'][number]) =>
    windows.map((window) => ({ ...window, days: [...window.days] }));
  return {
    settings: { ...settings, inputs: [...settings.inputs], program },
    traits: { ...traits, precedence: [...traits.precedence] },
    inputs: inputs.map((input) => ({ ...input, windows: windowsOf(input) })),
  };
}
