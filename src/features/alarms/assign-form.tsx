import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Choice } from '#src/components/ui/choice.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { t } from '#src/lib/messages/page-words.ts';
import type { ActAsked } from './act-dialog.tsx';
import { ActForm } from './act-form.tsx';
import { alarmQueries } from './alarm-queries.ts';

/** To whom alarms are given, with what each technician has already. */
export function AssignForm({ alarms, onAct, onCancel }: ActAsked) {
  const { data, isError, error, refetch } = useQuery(alarmQueries.technicians());
  const [chosen, setChosen] = useState(alarms[0]?.assignedTo?.id);
  if (data === undefined) {
    if (isError) return <ErrorNotice error={error} onRetry={() => void refetch()} />;
    return (
      <div aria-busy="true">
        <p role="status" className="sr-only">
          {t('shell.loading')}
        </p>
        <div aria-hidden="true" className="ruled h-24" />
      </div>
    );
  }
  const technicianId = chosen ?? data.items[0]?.id;
  if (technicianId === undefined) return <Notice title={t('assign.none')} />;
  const options = data.items.map(({ id, name, openAlarms }) => ({
    value: id,
    label: name,
    hint: t('assign.load', { count: openAlarms }),
  }));
  return (
    <ActForm
      save={t('assign.save')}
      detail={t('assign.detail')}
      onSave={() => onAct({ kind: 'assign', technicianId })}
      onCancel={onCancel}
    >
      <Choice legend={t('assign.who')} value={technicianId} options={options} onChange={setChosen} />
    </ActForm>
  );
}
