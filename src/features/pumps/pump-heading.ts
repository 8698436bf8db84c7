import type { PumpNow, PumpRow } from '#shared/contract/http/pumps.ts';
import { fitsSpeed, STANDSTILL_RPM } from '#shared/domain/control/speed-tolerance.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/page-words.ts';

/** Pad and pump as one name; a pad with a single, unnamed pump is enough by itself. */
export const nameOfPump = ({ padName, pumpName }: Pick<PumpRow, 'padName' | 'pumpName'>): string =>
  pumpName === '' ? padName : t('pump.named', { pad: padName, pump: pumpName });

/** How a pump does, for a heading and a homeowner's sentence alike. */
export type PumpCondition = 'running' | 'standing' | 'off' | 'stopped' | 'unplanned';

export function conditionOf({ rpm, expectedRpm }: Pick<PumpNow, 'rpm' | 'expectedRpm'>): PumpCondition {
  const stands = rpm <= STANDSTILL_RPM;
  const due = expectedRpm > STANDSTILL_RPM;
  if (stands) return due ? 'stopped' : 'standing';
  if (!due) return 'unplanned';
  return fitsSpeed(rpm, expectedRpm) ? 'running' : 'off';
}

/** The fact about a pump as a sentence: what it does now, and whether that is what it should. */
export function pumpHeading(pump: PumpRow, format: Format, now: number): string {
  const name = nameOfPump(pump);
  if (pump.serial === null) return t('pump.heading.noDevice', { name });
  if (pump.silentSince !== null) {
    return t('pump.heading.silent', { name, time: format.moment(pump.silentSince, pump.zone, now) });
  }
  if (pump.now === null) return t('pump.heading.never', { name });
  const rpm = format.rpm(pump.now.rpm);
  const expected = format.rpm(pump.now.expectedRpm);
  const condition = conditionOf(pump.now);
  if (condition === 'running') return t('pump.heading.running', { name, rpm });
  if (condition === 'standing') return t('pump.heading.standing', { name });
  if (condition === 'unplanned') return t('pump.heading.unplanned', { name, rpm });
  return condition === 'off'
    ? t('pump.heading.off', { name, rpm, expected })
    : t('pump.heading.stopped', { name, expected });
}
