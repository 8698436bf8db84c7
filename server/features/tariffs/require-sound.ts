import { RequestError } from '#server/errors.ts';
import { checkTariff } from '#shared/domain/energy/check-tariff.ts';
import type { Tariff } from '#shared/domain/energy/tariff.ts';
import type { Refusal } from '#shared/domain/refusal/refusal.ts';

/** A hole of a whole matrix is hundreds of faults; these many say enough. */
const MOST_ISSUES = 50;

/** Refuses by name, each fault with what is allowed there. */
export function refuse(detail: string, refusals: readonly Refusal[]): RequestError {
  const issues = refusals
    .slice(0, MOST_ISSUES)
    .map(({ field, reason, allowed }) => ({ path: field, message: `${reason}: ${allowed}` }));
  return new RequestError('validation', detail, { issues });
}

/** Refuses a tariff that leaves any hour of any month without a price. */
export function requireSound(tariff: Tariff): void {
  const faults = checkTariff(tariff);
  if (faults.length > 0) throw refuse('The tariff leaves something without a price, or contradicts itself.', faults);
}
