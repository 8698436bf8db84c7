import type { ReactNode } from 'react';
import type { PumpDetail, PumpNow } from '#shared/contract/http/pumps.ts';
import { STANDSTILL_RPM } from '#shared/domain/control/speed-tolerance.ts';
import { describeSource } from '#src/components/charts/strip/strip-words.ts';
import { Figures } from '#src/components/ui/figures.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { useNow } from '#src/hooks/use-now.ts';
import { listClosed } from '#src/lib/list-closed.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { whyNow } from '#src/lib/why/why.ts';
import { conditionOf } from './pump-heading.ts';

/** The readings this second, large enough for a phone held at arm's length, and why. */
export function NowCard({ pump }: { readonly pump: PumpDetail }) {
  const format = useFormat();
  const now = useNow(1000);
  const heard = pump.heardAt === null ? undefined : t('alarm.heard', { ago: format.span(now - pump.heardAt) });
  const live = pump.silentSince === null ? pump.now : null;
  return (
    <Sheet
      id="now"
      title={t('alarm.now')}
      aside={heard === undefined ? null : <span className="figures text-ink-2">{heard}</span>}
    >
      {live === null ? (
        <p className="px-4 py-4 sm:px-5">{t('alarm.notHeard')}</p>
      ) : (
        <>
          <LiveGrid pump={pump} live={live} />
          <p className="border-t border-rule px-4 py-3 text-17">
            <Figures text={whyNow(live, pump, format, 'technician')} />
          </p>
        </>
      )}
    </Sheet>
  );
}

function LiveGrid({ pump, live }: { readonly pump: PumpDetail; readonly live: PumpNow }) {
  const format = useFormat();
  const condition = conditionOf(live);
  const difference = Math.abs(live.rpm - live.expectedRpm);
  const off = condition === 'off' || condition === 'stopped' || condition === 'unplanned';
  const primed = live.primed === null ? '' : live.primed ? t('alarm.now.primed') : t('alarm.now.unprimed');
  return (
    <div className="grid grid-cols-2">
      <Cell
        name={t('alarm.now.speed')}
        below={off ? t('alarm.now.off', { difference: format.number(difference) }) : t('alarm.now.asExpected')}
      >
        {format.number(live.rpm)}
      </Cell>
      <Cell name={t('alarm.now.watts')} below={primed}>
        {format.number(live.watts)}
      </Cell>
      <Cell
        name={t('alarm.now.expected')}
        below={
          live.expectedRpm <= STANDSTILL_RPM
            ? t('alarm.now.nothingDue')
            : describeSource({ ...live, source: live.expectedSource })
        }
      >
        {format.number(live.expectedRpm)}
      </Cell>
      <InputsCell count={Math.max(pump.traits.inputCount, 1)} closed={listClosed(live.closedInputs)} />
    </div>
  );
}

const CELL = 'min-w-0 px-4 py-2.5 even:border-l even:border-rule nth-[n+3]:border-t nth-[n+3]:border-rule';

function Cell({
  name,
  below,
  children,
}: {
  readonly name: string;
  readonly below: string;
  readonly children: ReactNode;
}) {
  return (
    <div className={CELL}>
      <p className="text-ink-2">{name}</p>
      <p className="figures text-34 font-semibold tracking-[-0.03em]">{children}</p>
      <p className="min-h-5.5 text-ink-2">{below}</p>
    </div>
  );
}

function InputsCell({ count, closed }: { readonly count: number; readonly closed: readonly number[] }) {
  const numbers = Array.from({ length: count }, (_, index) => index + 1);
  return (
    <div className={CELL}>
      <p className="text-ink-2">{t('alarm.now.inputs')}</p>
      <ul className="flex flex-wrap gap-1.5 py-1.5">
        {numbers.map((input) => {
          const state = closed.includes(input) ? t('alarm.now.input.closed') : t('alarm.now.input.open');
          return (
            <li
              key={input}
              className={`figures border-2 border-ink px-2 py-0.5 font-semibold ${closed.includes(input) ? 'bg-ink text-sheet' : ''}`}
            >
              <span aria-hidden="true">{input}</span>
              <span className="sr-only">{t('alarm.now.input', { input, state })}</span>
            </li>
          );
        })}
      </ul>
      <p className="text-ink-2">
        {closed.length === 0 ? t('alarm.now.allOpen') : t('alarm.now.closed', { inputs: closed.join(', ') })}
      </p>
    </div>
  );
}
