/** One zone's offset from UTC over time, ms. Asked of the platform once per change and then remembered. */
export type Zone = {
  readonly name: string;
  readonly offsetAt: (at: number) => number;
  /** The next instant after `at` at which the offset changes, or Infinity when none comes within 400 days. */
  readonly nextChangeAfter: (at: number) => number;
};

type Stretch = { readonly from: number; readonly until: number; readonly offset: number };

const DAY_MS = 86_400_000;
const HORIZON_DAYS = 400;

/** Creates a zone from its IANA name; throws for a name the platform does not know. */
export function createZone(name: string): Zone {
  const format = new Intl.DateTimeFormat('en-US', {
    timeZone: name,
    hourCycle: 'h23',
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
    second: 'numeric',
  });
  const stretches: Stretch[] = [];
  let last: Stretch | undefined;
  const find = (at: number): Stretch => {
    if (last !== undefined && at >= last.from && at < last.until) return last;
    let stretch = stretches.find((candidate) => at >= candidate.from && at < candidate.until);
    if (stretch === undefined) {
      stretch = probe((instant) => askOffset(format, instant), at);
      stretches.push(stretch);
    }
    last = stretch;
    return stretch;
  };
  return {
    name,
    offsetAt: (at) => find(at).offset,
    nextChangeAfter: (at) => {
      const { until } = find(at);
      return until - at > HORIZON_DAYS * DAY_MS ? Number.POSITIVE_INFINITY : until;
    },
  };
}

function askOffset(format: Intl.DateTimeFormat, at: number): number {
  const second = Math.floor(at / 1000) * 1000;
  const fields = new Map(format.formatToParts(second).map((part) => [part.type, Number(part.value)]));
  const field = (type: Intl.DateTimeFormatPartTypes) => fields.get(type) ?? 0;
  const wall = Date.UTC(
    field('year'),
    field('month') - 1,
    field('day'),
    field('hour'),
    field('minute'),
    field('second'),
  );
  return wall - second;
}

/** The stretch of one offset around an instant: strides of a week forward and back, then halving to the second. */
function probe(ask: (at: number) => number, at: number): Stretch {
  const offset = ask(at);
  const edge = (direction: 1 | -1): number => {
    for (let days = 7; days <= HORIZON_DAYS; days += 7) {
      const there = at + direction * days * DAY_MS;
      if (ask(there) === offset) continue;
      let same = there - direction * 7 * DAY_MS;
      let other = there;
      while (Math.abs(other - same) > 1000) {
        const middle = Math.round((same + other) / 2000) * 1000;
        if (ask(middle) === offset) same = middle;
        else other = middle;
      }
      return direction === 1 ? other : same;
    }
    return direction === 1 ? Number.POSITIVE_INFINITY : at;
  };
  return { from: edge(-1), until: edge(1), offset };
}
