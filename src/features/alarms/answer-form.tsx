import { useState } from 'react';
import { TextArea } from '#src/components/ui/text-area.tsx';
import { t } from '#src/lib/messages/page-words.ts';
import type { ActAsked } from './act-dialog.tsx';
import { ActForm } from './act-form.tsx';

const LONGEST_NOTE = 500;

/** Why an alarm calls for nothing; the words may be left out. */
export function AnswerForm({ onAct, onCancel }: ActAsked) {
  const [note, setNote] = useState('');
  const save = () =>
    onAct(note.trim() === '' ? { kind: 'nothing-to-do' } : { kind: 'nothing-to-do', note: note.trim() });
  return (
    <ActForm save={t('answer.save')} onSave={save} onCancel={onCancel}>
      <TextArea
        label={t('answer.label')}
        hint={t('answer.hint')}
        maxLength={LONGEST_NOTE}
        value={note}
        onChange={(event) => setNote(event.target.value)}
      />
    </ActForm>
  );
}
