import type { RankedCause, RankedCauses } from '#shared/contract/http/alarms.ts';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { t } from '#src/lib/messages/page-words.ts';

/** What may lie behind an alarm, the likeliest first, with its reasons; a guess is called one. */
export function LikelySheet({ likely }: { readonly likely: RankedCauses }) {
  const { causes, certain, restsOn } = likely;
  if (causes.length === 0) return null;
  const shown = causes.filter(({ standing }) => standing !== 'unlikely');
  const rest = causes.filter(({ standing }) => standing === 'unlikely');
  const isStart = restsOn.includes('starting-guess');
  return (
    <Sheet id="likely" title={certain ? t('alarm.likely') : t('alarm.likely.guess')}>
      <div className="px-4 sm:px-5">
        {certain ? null : (
          <p className="pt-2.5 text-ink-2">
            {isStart ? t('alarm.likely.startingGuess') : t('alarm.likely.guessDetail')}
          </p>
        )}
        <ol>
          {shown.map((cause, index) => (
            <Cause key={cause.cause} cause={certain ? cause : unsure(cause)} place={index + 1} />
          ))}
        </ol>
        {rest.length === 0 ? null : (
          <details className="border-t border-rule py-2">
            <summary className="inline-flex min-h-6 items-center text-ink-2 underline underline-offset-2">
              {t('alarm.likely.rest', { count: rest.length })}
            </summary>
            <ol>
              {rest.map((cause, index) => (
                <Cause key={cause.cause} cause={cause} place={shown.length + index + 1} />
              ))}
            </ol>
          </details>
        )}
      </div>
    </Sheet>
  );
}

/** Where nothing singles one out, the first is no likelier than possible. */
const unsure = (cause: RankedCause): RankedCause =>
  cause.standing === 'likely' ? { ...cause, standing: 'possible' } : cause;

function Cause({ cause, place }: { readonly cause: RankedCause; readonly place: number }) {
  const { name, check, standing, detectorSays, reasonsFor, reasonsAgainst, found, calls } = cause;
  return (
    <li className="grid grid-cols-[30px_minmax(0,1fr)] gap-x-2 border-t border-rule py-2.5 first:border-0">
      <span aria-hidden="true" className="figures text-17 font-semibold">
        {place}
      </span>
      <div className="flex flex-col gap-0.5">
        <p className="text-17">
          <span className="font-semibold">{name}</span>{' '}
          <span className="text-ink-2">{t(`alarm.likely.${standing}`)}</span>
        </p>
        <Reasons
          label={t('alarm.likely.for')}
          lines={[...(detectorSays ? [t('alarm.likely.rule')] : []), ...reasonsFor]}
        />
        <Reasons label={t('alarm.likely.against')} lines={reasonsAgainst} />
        <Reasons label={t('alarm.likely.tell')} lines={[check]} />
        {found === 0 ? null : <p className="text-ink-2">{t('alarm.likely.found', { found, calls })}</p>}
      </div>
    </li>
  );
}

const Reasons = ({ label, lines }: { readonly label: string; readonly lines: readonly string[] }) =>
  lines.length === 0 ? null : (
    <p>
      <span className="text-ink-2">{label}: </span>
      {lines.join(' · ')}
    </p>
  );
