import type { Carbon } from '#shared/contract/http/energy-figures.ts';
import { Figures } from '#src/components/ui/figures.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';

/** What energy emits, with the factor and the year it was reckoned by. `saved` = what was not emitted. */
export function CarbonLine({ carbon, saved = false }: { readonly carbon: Carbon; readonly saved?: boolean }) {
  const format = useFormat();
  const { kilograms, factor } = carbon;
  const values = {
    kilograms: format.number(Math.abs(kilograms), Math.abs(kilograms) < 10 ? 1 : 0),
    gas: factor.gas === 'CO2' ? 'CO₂' : 'CO₂e',
    region: factor.region,
    year: String(factor.year),
    factor: format.number(factor.kilogramsPerKwh, 3),
  };
  return (
    <p className="text-ink-2">
      <Figures text={saved ? t('energy.carbon.saved', values) : t('energy.carbon.used', values)} />
    </p>
  );
}
