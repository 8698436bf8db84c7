import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';
import { silenceLimitMs } from '../link/link-tracker.ts';

type State = Record<string, never>;
type Parameters = RuleParameters<'silent'>;

/** Only time without a word while the server was listening counts; a start gives every pump the whole limit again. */
function judge(_: State, { link, receivedAt, context, stands }: Facts, { delaySeconds }: Parameters): Judgement {
  if (link.lastWordAt === 0) return UNJUDGED;
  const quietMs = receivedAt - Math.max(link.lastWordAt, link.listeningSince);
  if (quietMs <= silenceLimitMs(context))
    return link.lastWordAt > link.listeningSince || !stands('silent') ? NORMAL : ABNORMAL;
  return stands('silent') || quietMs >= delaySeconds * 1000 ? ABNORMAL : UNJUDGED;
}

function describe(_: State, facts: Facts, parameters: Parameters, { raised, from }: Spoken): Finding {
  const { link, receivedAt, reading } = facts;
  const since = raised ? from : link.lastWordAt;
  const silentMs = receivedAt - since;
  const ambient = reading.ambientCelsius;
  const frost = ambient !== undefined && ambient <= parameters.frostCelsius;
  const long = silentMs >= parameters.soonAfterHours * 3_600_000;
  return {
    cause: causeOf(facts, since),
    from: since,
    priority: frost ? 'urgent' : long ? 'soon' : 'note',
    evidence: {
      minutes: Math.round(silentMs / 60_000),
      connection: link.connection,
      lastRpm: reading.rpm,
      lastAmbientCelsius: ambient ?? null,
    },
  };
}

/**
 * What came back tells: a new boot means lost power, unless the motor ran on meanwhile; the same boot or readings from the silence a lost link. While
 * nothing comes, a device still connected is at fault itself; else nobody can tell but the neighbours.
 */
function causeOf({ link, reading }: Facts, since: number): string {
  if (link.lastWordAt > since) {
    if (link.restartedAt > since || link.connectedThroughAt > since) return 'device';
    if (link.bootedAt > since) return 'power';
    const toldOfSilence = reading.at > since && reading.at < link.heardSince - 60_000;
    return link.resumedAt > since || toldOfSilence ? 'link' : 'unknown';
  }
  return link.connection === 'online' ? 'device' : 'unknown';
}

export const silent = defineDetector<'silent', State>({
  detector: 'silent',
  hears: ['time', 'reading', 'status', 'settings', 'listening'],
  clock: 'arrival',
  looksAgainOnReturn: true,
  initial: () => ({}),
  judge,
  // The rule counts from the last word, which lies before the first judgement.
  delaySeconds: () => 0,
  describe,
});
