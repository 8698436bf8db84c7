import { Link } from 'react-router-dom';
import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import { FactList } from '#src/components/ui/fact-list.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { paths } from '#src/lib/paths.ts';

/** Motor, wet end, device, pool, and who is responsible. What was never recorded says so. */
export function UnitSheet({ pump }: { readonly pump: PumpDetail }) {
  const format = useFormat();
  const { motor, device } = pump;
  const unknown = <span className="text-ink-2">{t('pump.unit.unknown')}</span>;
  return (
    <Sheet id="unit" title={t('pump.unit')}>
      <div className="flex flex-col gap-3 px-4 py-3 sm:px-5">
        <FactList
          facts={[
            [
              t('pump.unit.motor'),
              motor === null
                ? unknown
                : t('pump.unit.motorValue', { model: motor.model, hp: motor.totalHorsepower, frame: motor.frame }),
            ],
            [t('pump.unit.motorSerial'), motor === null ? unknown : motor.serial],
            [
              t('pump.unit.installed'),
              motor?.installedAt === null || motor === null
                ? unknown
                : format.dayWithYear(motor.installedAt, pump.zone),
            ],
            [t('pump.unit.wetEnd'), pump.wetEndModel ?? unknown],
            [
              t('pump.unit.device'),
              device === null
                ? unknown
                : t('pump.unit.deviceValue', { serial: device.serial, state: t(`pump.unit.device.${device.state}`) }),
            ],
            [
              t('pump.unit.volts'),
              pump.nominalVolts === null ? unknown : t('pump.unit.voltsValue', { volts: pump.nominalVolts }),
            ],
            [t('pump.unit.pool'), pump.poolGallons === null ? unknown : format.quantity(pump.poolGallons, 'volume')],
            ...(pump.customerName === null ? [] : ([[t('pump.unit.customer'), pump.customerName]] as const)),
            [t('pump.unit.technician'), pump.technicianName ?? unknown],
          ]}
        />
        {pump.otherPumps.length === 0 ? null : (
          <p>
            {t('pump.otherPumps')}:{' '}
            {pump.otherPumps.map(({ id, name, monitored }) => (
              <span key={id} className="mr-3">
                <Link to={paths.pump(id)} className="underline underline-offset-2">
                  {name}
                </Link>
                {monitored ? null : <span className="text-ink-2"> ({t('pump.unmonitored')})</span>}
              </span>
            ))}
          </p>
        )}
      </div>
    </Sheet>
  );
}
