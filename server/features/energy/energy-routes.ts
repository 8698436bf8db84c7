import type { Mount } from '#server/http/mount.ts';
import { baselineEndpoints } from '#shared/contract/http/baselines.ts';
import { energyEndpoints } from '#shared/contract/http/energy.ts';
import { fleetEnergyEndpoints } from '#shared/contract/http/energy-fleet.ts';
import { programEndpoints } from '#shared/contract/http/energy-programs.ts';
import { readBaseline, stateBaseline } from './baseline.ts';
import { listPadEnergy } from './list-pad-months.ts';
import { listPrograms, readAdvice } from './list-programs.ts';
import { readFleetHours, readFleetMonth } from './read-fleet-month.ts';
import { readPadHours, readPumpHours } from './read-hours.ts';
import { readPadEnergy } from './read-pad-energy.ts';
import { readPumpEnergy } from './read-pump-energy.ts';

/** Energy, money and water over HTTP: of a pump, of a pad, of the company. */
export function mountEnergyRoutes(mount: Mount): void {
  mount.person(energyEndpoints.pump, (context, { params, query }) => readPumpEnergy(context, { ...params, ...query }));
  mount.person(energyEndpoints.pumpHours, (context, { params, query }) =>
    readPumpHours(context, { ...params, ...query }),
  );
  mount.person(energyEndpoints.pad, (context, { params, query }) => readPadEnergy(context, { ...params, ...query }));
  mount.person(energyEndpoints.padHours, (context, { params, query }) =>
    readPadHours(context, { ...params, ...query }),
  );
  mount.person(fleetEnergyEndpoints.month, (context, { query }) => readFleetMonth(context, query));
  mount.person(fleetEnergyEndpoints.hours, (context, { query }) => readFleetHours(context, query));
  mount.person(fleetEnergyEndpoints.pads, (context, { query }) => listPadEnergy(context, query));
  mount.person(programEndpoints.list, (context, { query }) => listPrograms(context, query));
  mount.person(programEndpoints.pump, (context, { params }) => readAdvice(context, params.pumpId));
  mount.person(baselineEndpoints.read, (context, { params }) => readBaseline(context, params.pumpId));
  mount.person(baselineEndpoints.replace, (context, { params, body, ifMatch }) =>
    stateBaseline(context, { ...params, ...body, ifMatch }),
  );
}
