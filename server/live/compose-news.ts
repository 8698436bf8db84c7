import type { Changes } from '#shared/contract/http/changes.ts';
import type { Role } from '#shared/contract/primitives.ts';

/** One change as JSON text, made once and sent to everyone who may see it. */
type Item = { readonly pumpId: string; readonly text: string };
/** `from` is when what it tells of began, ms. */
type DatedItem = { readonly pumpId: string | null; readonly text: string; readonly from: number };
type AlarmItem = DatedItem & { readonly textForHomeowner: string };

/** What changed in a company, ready to be cut for each connection. */
export type CompanyNews = {
  readonly cursor: string;
  readonly pumps: readonly Item[];
  readonly runs: readonly DatedItem[];
  readonly alarms: readonly AlarmItem[];
};

/** The pumps a person may see, each from an instant on (ms): the day on which they moved in. Staff see all. */
export type Sight = ReadonlyMap<string, number> | 'all';

/** What one connection gets of it. */
export type Audience = {
  readonly role: Role;
  readonly visible: Sight;
  readonly watched: ReadonlySet<string>;
};

/** Writes every change once. */
export function writeNews(
  changes: Changes,
  hideStaffWords: (alarm: Changes['alarms'][number]) => Changes['alarms'][number],
): CompanyNews {
  return {
    cursor: changes.cursor,
    pumps: changes.pumps.map((pump) => ({ pumpId: pump.pumpId, text: JSON.stringify(pump) })),
    runs: changes.runs.map((entry) => ({ pumpId: entry.pumpId, from: entry.run.from, text: JSON.stringify(entry) })),
    alarms: changes.alarms.map((alarm) => ({
      pumpId: alarm.pumpId,
      from: alarm.from,
      text: JSON.stringify(alarm),
      textForHomeowner: JSON.stringify(hideStaffWords(alarm)),
    })),
  };
}

/**
 * The frame for one connection: of pumps on its screen everything, of others what their alarms changed; never
 * anything of a pump the person may not see. Undefined where nothing is left.
 */
export function composeNews(news: CompanyNews, { role, visible, watched }: Audience): string | undefined {
  const sees = ({ pumpId }: Item): boolean => visible === 'all' || visible.has(pumpId);
  // What speaks for several pumps is for staff alone.
  const seesSince = ({ pumpId, from }: DatedItem): boolean =>
    visible === 'all' || (pumpId !== null && from >= (visible.get(pumpId) ?? Number.POSITIVE_INFINITY));
  const alarms = news.alarms.filter(seesSince);
  const alarmed = new Set(alarms.map(({ pumpId }) => pumpId));
  const pumps = news.pumps.filter((item) => sees(item) && (watched.has(item.pumpId) || alarmed.has(item.pumpId)));
  const runs = news.runs.filter((item) => seesSince(item) && item.pumpId !== null && watched.has(item.pumpId));
  if (pumps.length + runs.length + alarms.length === 0) return undefined;
  const list = (texts: readonly string[]): string => `[${texts.join(',')}]`;
  const alarmTexts = alarms.map((alarm) => (role === 'homeowner' ? alarm.textForHomeowner : alarm.text));
  return `{"type":"news","cursor":"${news.cursor}","pumps":${list(pumps.map(({ text }) => text))},"runs":${list(runs.map(({ text }) => text))},"alarms":${list(alarmTexts)}}`;
}
