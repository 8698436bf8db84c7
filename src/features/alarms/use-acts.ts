import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type AlarmAct, type AlarmActsDone, alarmActEndpoints } from '#shared/contract/http/alarm-acts.ts';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { call } from '#src/lib/api/api-client.ts';
import { describeError } from '#src/lib/api/describe-error.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { showNotice } from '#src/lib/notices.ts';
import { serverNow } from '#src/lib/server-clock.ts';
import { afterAct, undoOf } from './after-act.ts';
import { writeAlarm } from './alarm-cache.ts';
import { titleOf, whereOf } from './alarm-names.ts';
import { alarmQueries } from './alarm-queries.ts';

/** One act, and the alarms it is done to; `acts` where each has its own. */
export type Acting = {
  readonly alarms: readonly Alarm[];
  readonly act: AlarmAct;
  readonly actOf?: (alarm: Alarm) => AlarmAct | undefined;
  /** An undo: it has none itself, and it is done whatever became of the alarm meanwhile. */
  readonly isUndo?: boolean;
};

const listActs = ({ alarms, act, actOf, isUndo = false }: Acting) =>
  alarms.flatMap((alarm) => {
    const own = actOf === undefined ? act : actOf(alarm);
    return own === undefined ? [] : [{ alarmId: alarm.id, act: own, ...(isUndo ? {} : { version: alarm.version }) }];
  });

/**
 * Does something to one alarm or several: the screen shows it at once, the way back stands at the foot, what is refused
 * is put back and says why.
 */
export function useActs() {
  const client = useQueryClient();
  const { user } = useSession();
  const mutation = useMutation({
    mutationFn: (acting: Acting) => call(alarmActEndpoints.actOnMany, { body: { acts: listActs(acting) } }),
    onMutate: (acting) => {
      const now = serverNow();
      if (acting.isUndo !== true)
        for (const alarm of acting.alarms) writeAlarm(client, afterAct(alarm, acting.act, { name: user.name, now }));
    },
    onSuccess: (answer, acting) => {
      for (const alarm of answer.done) writeAlarm(client, alarm);
      putBack(acting, answer);
      tellOf(acting, answer, (undo) => mutation.mutate(undo));
    },
    onError: (error, { alarms }) => {
      for (const alarm of alarms) writeAlarm(client, alarm);
      tellRefused(alarms, describeError(error).title);
    },
    onSettled: () => client.invalidateQueries({ queryKey: alarmQueries.all() }),
  });
  const putBack = ({ alarms }: Acting, { refused }: AlarmActsDone) => {
    const ids = new Set(refused.map(({ alarmId }) => alarmId));
    for (const alarm of alarms) if (ids.has(alarm.id)) writeAlarm(client, alarm);
  };
  return mutation;
}

function tellOf(acting: Acting, { done, refused }: AlarmActsDone, undo: (acting: Acting) => void): void {
  if (done.length === 0) {
    tellRefused(acting.alarms, refused[0]?.detail ?? '');
    return;
  }
  const [only] = done;
  const what = t(`act.did.${acting.act.kind}`);
  const said =
    done.length === 1 && only !== undefined
      ? t('act.notice', { what, title: titleOf(only), where: whereOf(only) })
      : t('act.noticeMany', { what, count: done.length });
  const rest =
    refused.length === 0 ? '' : ` ${t('act.refusedMany', { count: refused.length, reason: refused[0]?.detail ?? '' })}`;
  const back = findUndo(acting, done);
  showNotice({
    text: `${said}${rest}`,
    trouble: refused.length > 0,
    ...(back === undefined
      ? {}
      : { action: { label: t('act.undo'), name: t('act.undoNamed', { what: said }), run: () => undo(back) } }),
  });
}

/** What takes back what was done; undefined for an undo itself, and where something of it cannot be taken back. */
function findUndo({ alarms, act, isUndo }: Acting, done: readonly Alarm[]): Acting | undefined {
  const ids = new Set(done.map(({ id }) => id));
  const before = alarms.filter(({ id }) => ids.has(id));
  const backs = new Map(before.map((alarm) => [alarm.id, undoOf(alarm, act, serverNow())]));
  const [first] = backs.values();
  if (isUndo === true || first === undefined || [...backs.values()].includes(undefined)) return undefined;
  return { alarms: done, act: first, actOf: ({ id }) => backs.get(id), isUndo: true };
}

function tellRefused(alarms: readonly Alarm[], reason: string): void {
  const [only] = alarms;
  const text =
    alarms.length === 1 && only !== undefined
      ? t('act.refused', { title: titleOf(only), where: whereOf(only), reason })
      : t('act.refusedMany', { count: alarms.length, reason });
  showNotice({ text, trouble: true });
}
