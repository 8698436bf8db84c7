import { useState } from 'react';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { Button } from '#src/components/ui/button.tsx';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { AcknowledgeButton } from './acknowledge-button.tsx';
import { ActButtons } from './act-buttons.tsx';
import { titleOf, whereOf } from './alarm-names.ts';
import { listOffered } from './offered-acts.ts';
import { PHONE_TARGET } from './phone-target.ts';

/** As many stand on a row; the rest is one click away. */
const IN_SIGHT = 1;

/** What may be done about a row's alarm now: acknowledging, the next thing most wanted, and the rest on demand. */
export function RowActions({ alarm }: { readonly alarm: Alarm }) {
  const { user } = useSession();
  const [open, setOpen] = useState(false);
  const offered = listOffered(alarm, user.role);
  const shown = open ? offered : offered.slice(0, IN_SIGHT);
  return (
    <div data-print="never" className="mt-2 flex flex-wrap gap-2 empty:hidden max-sm:gap-1 max-sm:*:px-2.5">
      {alarm.alarmClass === 'alarm' ? <AcknowledgeButton alarm={alarm} /> : null}
      <ActButtons alarms={[alarm]} kinds={shown} />
      {offered.length <= IN_SIGHT ? null : (
        <Button
          look="quiet"
          className={PHONE_TARGET}
          aria-expanded={open}
          aria-label={t('alarm.moreNamed', { title: titleOf(alarm), where: whereOf(alarm) })}
          onClick={() => setOpen(!open)}
        >
          {t(open ? 'alarm.less' : 'alarm.more')}
        </Button>
      )}
    </div>
  );
}
