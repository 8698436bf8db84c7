import { useNow } from '#src/hooks/use-now.ts';
import { useStore } from '#src/hooks/use-store.ts';
import { formatSpan } from '#src/lib/format/format-span.ts';
import type { LinkState } from '#src/lib/live/link-state.ts';
import { liveLink } from '#src/lib/live/live-link.ts';
import { t } from '#src/lib/messages/t.ts';

const WORDS: Readonly<Record<LinkState['phase'], (ago: string) => string>> = {
  live: () => t('link.live'),
  connecting: () => t('link.connecting'),
  stale: (ago) => t('link.stale', { ago }),
  broken: () => t('link.broken'),
  offline: () => t('link.offline'),
  'signed-out': () => t('link.signedOut'),
};

/** What the indicator says of a link at an instant (the browser's own, like `heardAt`). */
export const describeLink = ({ phase, heardAt }: LinkState, now: number): string =>
  WORDS[phase](formatSpan(now - (heardAt ?? now)));

const GLYPH: Readonly<Record<LinkState['phase'], string>> = {
  live: 'bg-ink',
  connecting: 'border border-ink-2',
  stale: 'border-2 border-p2',
  broken: 'border-2 border-p2',
  offline: 'border-2 border-p1',
  'signed-out': 'border-2 border-p1',
};

/** Said once, so without the seconds that count up. */
const spoken = (link: LinkState) => (link.phase === 'stale' ? WORDS.broken('') : describeLink(link, 0));

/** Whether what is on screen is live: a filled square and a word. Read out only when it changes, not every second. */
export function LiveIndicator() {
  const link = useStore(liveLink);
  useNow(1000);
  return (
    <span className="flex items-center gap-2 whitespace-nowrap text-13 text-ink-2">
      <span aria-hidden="true" className={`size-2.5 ${GLYPH[link.phase]}`} />
      <span className={link.phase === 'live' ? 'sr-only sm:not-sr-only' : ''}>{describeLink(link, Date.now())}</span>
      <span role="status" className="sr-only">
        {link.phase === 'live' || link.phase === 'connecting' ? '' : spoken(link)}
      </span>
    </span>
  );
}
