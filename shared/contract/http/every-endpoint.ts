import { alarmActEndpoints } from './alarm-acts.ts';
import { alarmHealthEndpoints } from './alarm-health.ts';
import { alarmEndpoints } from './alarms.ts';
import { backtestEndpoints } from './backtests.ts';
import { baselineEndpoints } from './baselines.ts';
import { changeEndpoints } from './changes.ts';
import { deviceEndpoints } from './devices.ts';
import type { Endpoint } from './endpoint.ts';
import { energyEndpoints } from './energy.ts';
import { fleetEnergyEndpoints } from './energy-fleet.ts';
import { programEndpoints } from './energy-programs.ts';
import { healthEndpoints } from './health.ts';
import { pumpEndpoints } from './pumps.ts';
import { ruleEndpoints } from './rules.ts';
import { sessionEndpoints } from './session.ts';
import { tariffEndpoints } from './tariffs.ts';

/** The whole HTTP surface, for the interface description and for tests that walk it. */
export const EVERY_ENDPOINT: readonly Endpoint[] = [
  ...Object.values(healthEndpoints),
  ...Object.values(sessionEndpoints),
  ...Object.values(pumpEndpoints),
  ...Object.values(alarmEndpoints),
  ...Object.values(alarmActEndpoints),
  ...Object.values(alarmHealthEndpoints),
  ...Object.values(energyEndpoints),
  ...Object.values(fleetEnergyEndpoints),
  ...Object.values(programEndpoints),
  ...Object.values(baselineEndpoints),
  ...Object.values(tariffEndpoints),
  ...Object.values(deviceEndpoints),
  ...Object.values(ruleEndpoints),
  ...Object.values(backtestEndpoints),
  ...Object.values(changeEndpoints),
];
