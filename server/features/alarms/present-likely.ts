import type { RankedCauses } from '#shared/contract/http/alarms.ts';
import type { WordedCauses } from '#shared/domain/causes/likely-causes-of.ts';

/** Ranked causes with their reasons, without the weights behind them. */
export const presentLikely = ({ causes, certain, restsOn }: WordedCauses): RankedCauses => ({
  causes: causes.map(({ cause, name, check, standing, detectorSays, reasonsFor, reasonsAgainst, found, calls }) => ({
    cause,
    name,
    check,
    standing,
    detectorSays,
    reasonsFor: [...reasonsFor],
    reasonsAgainst: [...reasonsAgainst],
    found,
    calls,
  })),
  certain,
  restsOn: [...restsOn],
});
