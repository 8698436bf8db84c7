import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { shareText } from './energy-view.ts';

const MOST = 4;

/** How far round the pool has gone: each field is a tenth of a turnover, the stroke one whole. */
export function TurnoverBar({ turnovers }: { readonly turnovers: number }) {
  const format = useFormat();
  const whole = Math.min(MOST, Math.max(1, Math.ceil(turnovers)));
  const share = Math.min(1, turnovers / whole) * 100;
  return (
    <div
      role="img"
      aria-label={t('home.water.bar', { share: shareText(turnovers, format) })}
      className="relative my-2 h-4.5 border border-ink"
    >
      <div className="h-full bg-wash" style={{ width: `${share}%` }} />
      {Array.from({ length: whole * 10 - 1 }, (_, index) => index + 1).map((tenth) => (
        <span
          key={tenth}
          className={`absolute inset-y-0 w-px ${tenth % 10 === 0 ? 'bg-ink' : 'bg-rule'}`}
          style={{ left: `${(tenth / (whole * 10)) * 100}%` }}
        />
      ))}
      <span className="absolute -inset-y-1 w-0.5 bg-ink" style={{ left: `${share}%` }} />
    </div>
  );
}
