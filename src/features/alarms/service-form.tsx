import { useState } from 'react';
import { TextArea } from '#src/components/ui/text-area.tsx';
import { t } from '#src/lib/messages/page-words.ts';
import type { ActAsked } from './act-dialog.tsx';
import { ActForm } from './act-form.tsx';

const LONGEST_REASON = 300;

/** Why an alarm goes out of service. */
export function ServiceForm({ onAct, onCancel }: ActAsked) {
  const [reason, setReason] = useState('');
  const [tried, setTried] = useState(false);
  const save = () => {
    setTried(true);
    if (reason.trim() !== '') onAct({ kind: 'take-out-of-service', reason: reason.trim() });
  };
  return (
    <ActForm save={t('service.save')} detail={t('service.detail')} onSave={save} onCancel={onCancel}>
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
