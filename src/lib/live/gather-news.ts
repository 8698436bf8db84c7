import type { ServerFrame } from '#shared/contract/socket/frames.ts';

export type News = Pick<Extract<ServerFrame, { type: 'news' }>, 'pumps' | 'runs' | 'alarms'>;

const lastOf = <Item>(items: readonly Item[], keyOf: (item: Item) => string): Item[] => [
  ...new Map(items.map((item) => [keyOf(item), item])).values(),
];

/**
 * Several frames as one, in order: of each pump, run and alarm only the latest word counts. Screens are told at most
 * four times a second, however fast the readings come.
 */
export function gatherNews(frames: readonly News[]): News {
  return {
    pumps: lastOf(
      frames.flatMap(({ pumps }) => pumps),
      ({ pumpId }) => pumpId,
    ),
    runs: lastOf(
      frames.flatMap(({ runs }) => runs),
      ({ pumpId, run }) => `${pumpId} ${run.from}`,
    ),
    alarms: lastOf(
      frames.flatMap(({ alarms }) => alarms),
      ({ id }) => id,
    ),
  };
}
