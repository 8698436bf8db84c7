import type { Alarm } from '#shared/contract/http/alarms.ts';
import { Button } from '#src/components/ui/button.tsx';
import { useNow } from '#src/hooks/use-now.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { titleOf, whereOf } from './alarm-names.ts';
import { isWaiting, mayUndo } from './alarm-view.ts';
import { PHONE_TARGET } from './phone-target.ts';
import { useAcknowledge } from './use-acknowledge.ts';
import { useWithdraw } from './use-withdraw.ts';

export type AcknowledgeButtonProps = {
  readonly alarm: Alarm;
  readonly note?: string;
  /** As high as a gloved finger needs, and as wide as the page. */
  readonly touch?: boolean;
  readonly look?: 'main' | 'plain';
};

/** Acknowledge; for five minutes after one has, the way back; else nothing. */
export function AcknowledgeButton({ alarm, note = '', touch = false, look = 'main' }: AcknowledgeButtonProps) {
  const acknowledge = useAcknowledge();
  const withdraw = useWithdraw();
  const { user } = useSession();
  const now = useNow(10_000);
  const words = { title: titleOf(alarm), where: whereOf(alarm) };
  const latched = alarm.state === 'latched';
  const wide = touch ? 'w-full' : PHONE_TARGET;
  if (isWaiting(alarm)) {
    return (
      <Button
        look={look}
        touch={touch}
        className={wide}
        aria-label={t(latched ? 'alarm.releaseNamed' : 'alarm.acknowledgeNamed', words)}
        onClick={() => acknowledge.mutate({ alarm, note })}
      >
        {t(latched ? 'alarm.release' : 'alarm.acknowledge')}
      </Button>
    );
  }
  if (alarm.answer !== null || !mayUndo(alarm, user.name, now)) return null;
  return (
    <Button
      touch={touch}
      className={wide}
      disabled={acknowledge.isPending || withdraw.isPending}
      aria-label={t('alarm.undoNamed', words)}
      onClick={() => withdraw.mutate(alarm)}
    >
      {t('alarm.undo')}
    </Button>
  );
}
