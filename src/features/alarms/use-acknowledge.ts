import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type Alarm, alarmEndpoints } from '#shared/contract/http/alarms.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { call } from '#src/lib/api/api-client.ts';
import { describeError } from '#src/lib/api/describe-error.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { showNotice } from '#src/lib/notices.ts';
import { serverNow } from '#src/lib/server-clock.ts';
import { writeAlarm } from './alarm-cache.ts';
import { titleOf, whereOf } from './alarm-names.ts';
import { alarmQueries } from './alarm-queries.ts';
import { acknowledgedBy } from './alarm-view.ts';
import { useWithdraw } from './use-withdraw.ts';

export type Acknowledgement = { readonly alarm: Alarm; readonly note?: string };

/** Acknowledges an alarm: the screen shows it at once, the way back stands at the foot, a refusal puts it back. */
export function useAcknowledge() {
  const client = useQueryClient();
  const { user } = useSession();
  const withdraw = useWithdraw();
  return useMutation({
    mutationFn: ({ alarm, note }: Acknowledgement) =>
      call(alarmEndpoints.acknowledge, {
        params: { alarmId: alarm.id },
        body: note === undefined || note === '' ? {} : { note },
      }),
    onMutate: ({ alarm }) => writeAlarm(client, acknowledgedBy(alarm, user.name, serverNow())),
    onSuccess: (answer) => {
      writeAlarm(client, answer);
      const words = { title: titleOf(answer), where: whereOf(answer) };
      showNotice({
        text: t('alarm.acknowledged', words),
        action: { label: t('alarm.undo'), name: t('alarm.undoNamed', words), run: () => withdraw.mutate(answer) },
      });
    },
    onError: (error, { alarm }) => {
      writeAlarm(client, alarm);
      const words = { title: titleOf(alarm), where: whereOf(alarm), reason: describeError(error).title };
      showNotice({ text: t('alarm.acknowledgeFailed', words), trouble: true });
    },
    onSettled: () => client.invalidateQueries({ queryKey: alarmQueries.all() }),
  });
}
