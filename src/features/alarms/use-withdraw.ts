import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type Alarm, alarmEndpoints } from '#shared/contract/http/alarms.ts';
import { call } from '#src/lib/api/api-client.ts';
import { describeError } from '#src/lib/api/describe-error.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { showNotice } from '#src/lib/notices.ts';
import { writeAlarm } from './alarm-cache.ts';
import { titleOf, whereOf } from './alarm-names.ts';
import { alarmQueries } from './alarm-queries.ts';

/** Takes one's own acknowledgement back. */
export function useWithdraw() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (alarm: Alarm) => call(alarmEndpoints.withdrawAcknowledgement, { params: { alarmId: alarm.id } }),
    onSuccess: (answer) => {
      writeAlarm(client, answer);
      showNotice({ text: t('alarm.withdrawn', { title: titleOf(answer), where: whereOf(answer) }) });
    },
    onError: (error) => showNotice({ text: describeError(error).title, trouble: true }),
    onSettled: () => client.invalidateQueries({ queryKey: alarmQueries.all() }),
  });
}
