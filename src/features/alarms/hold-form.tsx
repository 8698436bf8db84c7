import { useState } from 'react';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { Choice } from '#src/components/ui/choice.tsx';
import { Field } from '#src/components/ui/field.tsx';
import { TextArea } from '#src/components/ui/text-area.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { serverNow } from '#src/lib/server-clock.ts';
import type { ActAsked } from './act-dialog.tsx';
import { ActForm } from './act-form.tsx';
import { HOLD_CHOICES, type HoldChoice, listHoldEnds, mayEndAt, readPadTime } from './hold-ends.ts';

const LONGEST_REASON = 300;

/** Several alarms are held until one instant, in the time of the first one's pad; a next stop they must share. */
function placeOf([first, ...others]: readonly Alarm[], now: number) {
  const nextStopOn = first?.nextStopOn ?? null;
  const shared = others.every((alarm) => alarm.nextStopOn === nextStopOn);
  return { zone: first?.zone ?? 'UTC', nextStopOn: shared ? nextStopOn : null, now };
}

/** Until when, and why. */
export function HoldForm({ alarms, onAct, onCancel }: ActAsked) {
  const format = useFormat();
  const [place] = useState(() => placeOf(alarms, serverNow()));
  const ends = listHoldEnds(place);
  const [choice, setChoice] = useState<HoldChoice>('fourHours');
  const [other, setOther] = useState('');
  const [reason, setReason] = useState('');
  const [tried, setTried] = useState(false);
  const until = choice === 'other' ? readPadTime(other, place.zone) : ends.get(choice);
  const allowed = mayEndAt(until, place.now);
  const save = () => {
    setTried(true);
    if (allowed && reason.trim() !== '') onAct({ kind: 'shelve', until, reason: reason.trim() });
  };
  const options = HOLD_CHOICES.filter((each) => each === 'other' || ends.has(each)).map((value) => {
    const at = ends.get(value);
    return {
      value,
      label: t(`hold.${value}`),
      ...(at === undefined ? {} : { hint: format.moment(at, place.zone, place.now) }),
    };
  });
  return (
    <ActForm save={t('hold.save')} detail={t('hold.quiet')} onSave={save} onCancel={onCancel}>
      <Choice legend={t('hold.until')} value={choice} options={options} onChange={setChoice} />
      {choice === 'other' ? (
        <Field
          type="datetime-local"
          label={t('hold.otherLabel')}
          value={other}
          onChange={(event) => setOther(event.target.value)}
          error={tried && !allowed ? t('hold.refused') : undefined}
        />
      ) : null}
      <TextArea
        label={t('reason.label')}
        hint={t('reason.hint')}
        maxLength={LONGEST_REASON}
        value={reason}
        onChange={(event) => setReason(event.target.value)}
        error={tried && reason.trim() === '' ? t('reason.missing') : undefined}
      />
    </ActForm>
  );
}
