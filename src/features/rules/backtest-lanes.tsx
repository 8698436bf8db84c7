import type { ComparedAlarm } from '#shared/contract/http/backtests.ts';
import { t } from '#src/lib/messages/rules-words.ts';

export type BacktestLanesProps = {
  readonly alarms: readonly ComparedAlarm[];
  readonly from: number;
  readonly to: number;
};

type Lane = 'before' | 'after';
const LANES: readonly Lane[] = ['before', 'after'];
/** A short alarm is still a mark that can be seen. */
const LEAST_WIDTH_PERCENT = 0.6;

/** When alarms stood under both versions, one above the other; the table beside it says the same. */
export function BacktestLanes({ alarms, from, to }: BacktestLanesProps) {
  const share = (at: number): number => (Math.min(Math.max(at, from), to) - from) / (to - from);
  return (
    <div role="img" aria-label={t('try.lanes')} className="flex flex-col gap-1 py-2">
      {LANES.map((lane) => (
        <div key={lane} className="relative h-3 border-b border-rule">
          {alarms.map((alarm, index) => {
            const stood = alarm[lane];
            if (stood === null) return null;
            const [left, right] = [share(stood.raised), share(stood.to ?? to)];
            return (
              <div
                // biome-ignore lint/suspicious/noArrayIndexKey: the list never changes its order.
                key={index}
                className={`absolute inset-y-0 border border-ink ${alarm.difference === 'same' ? 'bg-rule' : 'bg-ink'}`}
                style={{ left: `${left * 100}%`, width: `${Math.max(LEAST_WIDTH_PERCENT, (right - left) * 100)}%` }}
              />
            );
          })}
        </div>
      ))}
    </div>
  );
}
