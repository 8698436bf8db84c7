import { fitsSpeed } from '#shared/domain/control/speed-tolerance.ts';
import { inputSpeed, listClosedInputs } from '#shared/domain/control/winning-input.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';

/**
 * The input whose speed the motor runs though another should win: a lower closed one, or an open one; 0 = none. What
 * the motor says it obeys is heard first.
 *
 * @example followedInput(facts) // 2
 */
export function followedInput({ reading, control, context, inputs }: Facts): number {
  const fits = (input: number): boolean =>
    (inputs.wired & (1 << (input - 1))) !== 0 && fitsSpeed(reading.rpm, inputSpeed(context.settings.inputs, input));
  const { activeInput } = reading;
  if (activeInput !== 0 && activeInput !== control.winningInput && fits(activeInput)) return activeInput;
  const among = control.winningInput === 0 ? inputs.wired : reading.closedInputs;
  return listClosedInputs(among).find((input) => input !== control.winningInput && fits(input)) ?? 0;
}

/** Why the speed is wrong, as far as the readings can tell; `unknown-speed` where they cannot. */
export function wrongSpeedCause(facts: Facts, parameters: RuleParameters<'wrong-speed'>): string {
  const { reading, control, context } = facts;
  const { settings } = context;
  const followed = followedInput(facts);
  if (control.winningInput !== 0) {
    if (followed !== 0) return 'follows-lower-input';
    if (runsOpenInput(facts)) return 'runs-input-open';
    if (reading.activeInput === 0) return 'ignores-input';
    if (settings.program.some((entry) => fitsSpeed(reading.rpm, entry.rpm))) return 'ignores-input';
  } else if (followed !== 0) return 'runs-input-open';
  if (reading.rpm >= control.due.rpm) return 'unknown-speed';
  if (isHot(facts, parameters)) return 'derating';
  return isAtPowerLimit(facts, parameters) ? 'power-limit' : 'unknown-speed';
}

/** Of the watts at the fastest commissioned speed: less than this is no power limit (common practice). */
const LIMIT_SHARE = 0.4;

/** Another input should win, and the motor runs the speed of a wired one that is open, which no program asks for. */
function runsOpenInput({ reading, control, context, inputs }: Facts): boolean {
  const { settings } = context;
  return (
    reading.activeInput !== control.winningInput &&
    listClosedInputs(inputs.wired & ~reading.closedInputs).some((input) =>
      fitsSpeed(reading.rpm, inputSpeed(settings.inputs, input)),
    ) &&
    !settings.program.some((entry) => fitsSpeed(reading.rpm, entry.rpm))
  );
}

function isHot({ reading, context }: Facts, { hotMarginCelsius }: RuleParameters<'wrong-speed'>): boolean {
  const { driveCelsius } = reading;
  return driveCelsius !== undefined && driveCelsius >= context.traits.driveHotCelsius - hotMarginCelsius;
}

/**
 * It draws about what the full speed would draw and still does not reach it, and clearly more than its own speed
 * usually does, or far more than that; or the supply is too low for it. Single readings are too noisy to tell.
 */
function isAtPowerLimit(
  { reading, control, context, load }: Facts,
  parameters: RuleParameters<'wrong-speed'>,
): boolean {
  const { volts } = reading;
  const { nominalVolts, settings } = context;
  const { watts } = load;
  if (volts !== undefined && nominalVolts !== undefined && volts < parameters.lowVoltsShare * nominalVolts) return true;
  const usual = load.wattsAt(reading.rpm);
  // A limit bites near the most that the motor is asked for, never at a slow speed while a fast one goes well.
  const fastest = Math.max(settings.prime?.rpm ?? 0, ...settings.inputs.map((rpm) => rpm ?? 0), control.due.rpm);
  if (watts < LIMIT_SHARE * load.wattsAt(fastest)) return false;
  if (usual > 0 && watts >= parameters.overloadShare * usual) return true;
  const full = load.wattsAt(control.due.rpm);
  const isLoaded = usual > 0 && watts >= parameters.limitOverUsual * usual;
  return isLoaded && full > 0 && watts >= parameters.powerLimitShare * full;
}
