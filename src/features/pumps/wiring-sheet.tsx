import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { describeDays } from '#src/lib/describe-days.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/page-words.ts';

type Wired = PumpDetail['inputs'][number];
type WiringRow = { readonly number: number; readonly rpm: number | null; readonly wired: Wired | undefined };

/** Every input the motor has, wired or not: an unwired one is where a lead may have ended up. */
const listWiring = ({ inputs, settings, traits }: PumpDetail): WiringRow[] =>
  Array.from({ length: Math.max(traits.inputCount, settings.inputs.length) }, (_, index) => ({
    number: index + 1,
    rpm: settings.inputs[index] ?? null,
    wired: inputs.find(({ number }) => number === index + 1),
  }));

const describeCloser = ({ kind, clockType, circuit }: Wired): string =>
  [
    t(`pump.kind.${kind}`),
    clockType === undefined ? undefined : t(`pump.clock.${clockType}`),
    circuit === undefined ? undefined : t(`pump.wiring.circuit.${circuit}`),
  ]
    .filter((part) => part !== undefined)
    .join(', ');

const describeWindow = (window: Wired['windows'][number], format: Format): string =>
  [
    `${describeDays(window.days, format.locale)} ${format.minuteOfDay(window.onMinute)}–${format.minuteOfDay(window.offMinute)}`,
    window.opensEarlyMinutes === 0 ? undefined : t('pump.wiring.early', { minutes: window.opensEarlyMinutes }),
  ]
    .filter((part) => part !== undefined)
    .join(', ');

/** What closes each speed input, when, for what, and the speed it has. */
export function WiringSheet({ pump }: { readonly pump: PumpDetail }) {
  const format = useFormat();
  const rows = listWiring(pump);
  return (
    <Sheet id="wiring" title={t('pump.wiring')}>
      <div className="px-4 py-3 sm:px-5">
        {rows.length === 0 ? (
          <p>{t('pump.wiring.none')}</p>
        ) : (
          <DataTable
            wide
            stacked
            caption={t('pump.wiring')}
            rows={rows}
            keyOf={({ number }) => number}
            columns={[
              { head: t('pump.wiring.input'), figures: true, cell: ({ number }: WiringRow) => number },
              {
                head: t('pump.settings.speed'),
                figures: true,
                cell: ({ rpm }) => (rpm === null ? '–' : format.rpm(rpm)),
              },
              {
                head: t('pump.wiring.closes'),
                cell: ({ wired }) => (wired === undefined ? t('pump.wiring.notWired') : describeCloser(wired)),
              },
              {
                head: t('pump.wiring.windows'),
                cell: ({ wired }) => wired?.windows.map((window) => describeWindow(window, format)).join('; '),
              },
              {
                head: t('pump.wiring.drives'),
                cell: ({ wired }) => (wired?.drives === undefined ? '' : t(`pump.duty.${wired.drives}`)),
              },
            ]}
          />
        )}
      </div>
    </Sheet>
  );
}
