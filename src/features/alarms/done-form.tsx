import { useState } from 'react';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { CAUSE_WORDS } from '#shared/domain/causes/cause-words.data.ts';
import { listFindings } from '#shared/domain/causes/rank-causes.ts';
import { Choice } from '#src/components/ui/choice.tsx';
import { TextArea } from '#src/components/ui/text-area.tsx';
import { t } from '#src/lib/messages/page-words.ts';
import type { ActAsked } from './act-dialog.tsx';
import { ActForm } from './act-form.tsx';

const LONGEST_FINDING = 1000;
const NONE = '';

const findingsOf = ([first]: readonly Alarm[]) =>
  first === undefined
    ? []
    : listFindings(first.detector).map((cause) => ({ value: cause, label: CAUSE_WORDS[cause].name }));

/** What was found at the pad, in words and, where it is one of the causes that are weighed, by its name. */
export function DoneForm({ alarms, onAct, onCancel }: ActAsked) {
  const [found, setFound] = useState('');
  const [cause, setCause] = useState<string>(NONE);
  const [tried, setTried] = useState(false);
  const findings = findingsOf(alarms);
  const save = () => {
    setTried(true);
    if (found.trim() === '') return;
    onAct({ kind: 'work-off', found: found.trim(), ...(cause === NONE ? {} : { cause }) });
  };
  return (
    <ActForm save={t('done.save')} detail={t('done.detail')} onSave={save} onCancel={onCancel}>
      <TextArea
        label={t('done.found')}
        maxLength={LONGEST_FINDING}
        value={found}
        onChange={(event) => setFound(event.target.value)}
        error={tried && found.trim() === '' ? t('done.missing') : undefined}
      />
      {findings.length === 0 ? null : (
        <Choice
          legend={t('done.cause')}
          value={cause}
          options={[...findings, { value: NONE, label: t('done.cause.none') }]}
          onChange={setCause}
        />
      )}
    </ActForm>
  );
}
