import type { StoredRules } from '#shared/contract/http/rules.ts';
import { PRIORITIES } from '#shared/domain/detectors/detector.ts';
import { DETECTOR_CLASSES } from '#shared/domain/detectors/detector-classes.data.ts';
import type { FoldedDetector } from '#shared/domain/detectors/detector-defaults.data.ts';
import { listFigures } from '#shared/domain/detectors/figure-limits.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Field } from '#src/components/ui/field.tsx';
import { Select } from '#src/components/ui/select.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { figureName, t } from '#src/lib/messages/rules-words.ts';
import { type FigureForm, formOfFigure, parseFigure, sayFigure } from './figure-view.ts';
import { countSet, type RuleDraft } from './rule-draft.ts';

export type RuleFormProps = {
  readonly detector: FoldedDetector;
  readonly draft: RuleDraft;
  /** What holds where the draft says nothing. */
  readonly inherited: StoredRules;
  readonly onChange: (draft: RuleDraft) => void;
  readonly readOnly: boolean;
  /** Nothing holds above but the defaults. */
  readonly isFirst: boolean;
};

/** One rule's switch, priority and figures. An empty figure holds as above. */
export function RuleForm({ detector, draft, inherited, onChange, readOnly, isFirst }: RuleFormProps) {
  const above = inherited[detector] ?? {};
  const usualPriority = above.priority ?? DETECTOR_CLASSES[detector].priority;
  const isOn = above.enabled ?? true;
  return (
    <fieldset disabled={readOnly} className="flex flex-col gap-4 px-4 pb-4 sm:px-5">
      <div className="flex flex-wrap gap-x-6 gap-y-2">
        <Select
          label={t('rules.speaks')}
          value={draft.enabled}
          onChange={(enabled) => onChange({ ...draft, enabled })}
          options={[
            {
              value: '',
              label: t(isFirst ? 'rules.speaks.usual' : 'rules.speaks.inherit', {
                value: isOn ? t('rules.speaks.on') : t('rules.off'),
              }),
            },
            { value: 'on', label: t('rules.speaks.on') },
            { value: 'off', label: t('rules.speaks.off') },
          ]}
        />
        <Select
          label={t('rules.priority')}
          value={draft.priority}
          onChange={(priority) => onChange({ ...draft, priority })}
          options={[
            {
              value: '',
              label: t(isFirst ? 'rules.priority.usual' : 'rules.priority.inherit', {
                value: t(`mark.${usualPriority}`),
              }),
            },
            ...PRIORITIES.map((value) => ({ value, label: t(`mark.${value}`) })),
          ]}
        />
        <p className="w-full text-13 text-ink-2">{t('rules.priority.hint')}</p>
      </div>
      <div className="grid gap-4 sm:grid-cols-2 lg:grid-cols-3">
        {listFigures(detector).map(([name, usual]) => (
          <FigureField
            key={name}
            name={name}
            usual={usual}
            inherited={above.figures?.[name]}
            text={draft.figures[name] ?? ''}
            onChange={(text) => onChange({ ...draft, figures: { ...draft.figures, [name]: text } })}
          />
        ))}
      </div>
      {countSet(draft) === 0 ? null : (
        <div>
          <Button onClick={() => onChange({ enabled: '', priority: '', figures: {} })}>
            {t(isFirst ? 'rules.resetUsual' : 'rules.reset')}
          </Button>
        </div>
      )}
    </fieldset>
  );
}

type FigureFieldProps = {
  readonly name: string;
  readonly usual: number;
  readonly inherited: number | undefined;
  readonly text: string;
  readonly onChange: (text: string) => void;
};

function FigureField({ name, usual, inherited, text, onChange }: FigureFieldProps) {
  const { units } = useFormat();
  const form = formOfFigure(name, usual, units);
  const unit = t(`unit.${form.unit === 'd' ? 'h' : form.unit}`, { number: '' }).trim();
  const label = form.unit === 'd' ? figureName(name) : `${figureName(name)}${unit === '' ? '' : ` (${unit})`}`;
  const isWrong = text.trim() !== '' && parseFigure(text, form) === undefined;
  return (
    <Field
      label={label}
      inputMode="decimal"
      value={text}
      placeholder={sayFigure(inherited ?? usual, form)}
      onChange={(event) => onChange(event.target.value)}
      hint={hintOf(form, usual, inherited)}
      error={isWrong ? errorOf(form) : undefined}
    />
  );
}

const rangeOf = (form: FigureForm) => ({
  least: sayFigure(form.limits.least, form),
  most: sayFigure(form.limits.most, form),
});

function hintOf(form: FigureForm, usual: number, inherited: number | undefined): string {
  const said = { usual: sayFigure(usual, form), ...rangeOf(form) };
  return inherited === undefined || inherited === usual
    ? t('rules.figure.hint', said)
    : t('rules.figure.inherited', { inherited: sayFigure(inherited, form), ...said });
}

const errorOf = (form: FigureForm): string =>
  form.limits.whole && form.size === 1
    ? t('rules.figure.whole', rangeOf(form))
    : t('rules.figure.wrong', rangeOf(form));
