import { airLeak } from './air-leak.ts';
import { airLeakAtRestart } from './air-leak-at-restart.ts';
import { blockedSuction } from './blocked-suction.ts';
import { bypassOpen } from './bypass-open.ts';
import { clockDrifts } from './clock-drifts.ts';
import { clockStoppedByCut } from './clock-stopped-by-cut.ts';
import { daylightSavingForgotten } from './daylight-saving-forgotten.ts';
import { deadShaft } from './dead-shaft.ts';
import { deratingDrive } from './derating-drive.ts';
import { dirtyFilter } from './dirty-filter.ts';
import { drainedBack } from './drained-back.ts';
import { driveFault } from './drive-fault.ts';
import { driveHot } from './drive-hot.ts';
import { energizedWithoutFlow } from './energized-without-flow.ts';
import type { Fault } from './fault.ts';
import { fedThroughClock } from './fed-through-clock.ts';
import { followsLowerInput } from './follows-lower-input.ts';
import { freezingPad } from './freezing-pad.ts';
import { ignoresInput } from './ignores-input.ts';
import { keypadHold } from './keypad-hold.ts';
import { leverLeftOn } from './lever-left-on.ts';
import { looseWire } from './loose-wire.ts';
import { lossOfPrimeRagged } from './loss-of-prime-ragged.ts';
import { lossOfPrimeSudden } from './loss-of-prime-sudden.ts';
import { missingInput } from './missing-input.ts';
import { missingInputsAll } from './missing-inputs-all.ts';
import { motorClockDrifts } from './motor-clock-drifts.ts';
import { motorClockForgetsDaylightSaving } from './motor-clock-forgets-daylight-saving.ts';
import { motorClockStoppedByCut } from './motor-clock-stopped-by-cut.ts';
import { pluggedBasket } from './plugged-basket.ts';
import { powerLimit } from './power-limit.ts';
import { programChanged } from './program-changed.ts';
import { pumpingToWaste } from './pumping-to-waste.ts';
import { rubbingImpeller } from './rubbing-impeller.ts';
import { runsInputOpen } from './runs-input-open.ts';
import { settingsChanged } from './settings-changed.ts';
import { silentDevice } from './silent-device.ts';
import { silentLink } from './silent-link.ts';
import { silentPower } from './silent-power.ts';
import { skewedDevice } from './skewed-device.ts';
import { slowPrime } from './slow-prime.ts';
import { stoppedByFault } from './stopped-by-fault.ts';
import { stoppedByKeypad } from './stopped-by-keypad.ts';
import { strangeActiveInput } from './strange-active-input.ts';
import { supplySag } from './supply-sag.ts';
import { supplyStanding } from './supply-standing.ts';
import { swappedLeads } from './swapped-leads.ts';
import { switchFailing } from './switch-failing.ts';
import { switchWelded } from './switch-welded.ts';
import { tripperMissing } from './tripper-missing.ts';
import { trippersMoved } from './trippers-moved.ts';
import { unaskedRun } from './unasked-run.ts';
import { unknownSpeed } from './unknown-speed.ts';
import { valveShut } from './valve-shut.ts';
import { waterLow } from './water-low.ts';

/** Everything that can go wrong, one file each. */
export const FAULTS: readonly Fault[] = [
  airLeak,
  airLeakAtRestart,
  blockedSuction,
  bypassOpen,
  clockDrifts,
  clockStoppedByCut,
  daylightSavingForgotten,
  deadShaft,
  deratingDrive,
  dirtyFilter,
  drainedBack,
  driveFault,
  driveHot,
  energizedWithoutFlow,
  fedThroughClock,
  followsLowerInput,
  freezingPad,
  ignoresInput,
  keypadHold,
  leverLeftOn,
  looseWire,
  lossOfPrimeRagged,
  lossOfPrimeSudden,
  missingInput,
  missingInputsAll,
  motorClockDrifts,
  motorClockForgetsDaylightSaving,
  motorClockStoppedByCut,
  pluggedBasket,
  powerLimit,
  programChanged,
  pumpingToWaste,
  rubbingImpeller,
  runsInputOpen,
  settingsChanged,
  silentDevice,
  silentLink,
  silentPower,
  skewedDevice,
  slowPrime,
  stoppedByFault,
  stoppedByKeypad,
  strangeActiveInput,
  supplySag,
  supplyStanding,
  swappedLeads,
  switchFailing,
  switchWelded,
  tripperMissing,
  trippersMoved,
  unaskedRun,
  unknownSpeed,
  valveShut,
  waterLow,
];

/** The fault of a slug; throws for one that is not in the catalogue: scenarios are ours to get right. */
export function getFault(slug: string): Fault {
  const fault = FAULTS.find((candidate) => candidate.slug === slug);
  if (fault === undefined) throw new Error(`There is no fault named ${slug}.`);
  return fault;
}
