import { useState } from 'react';
import type { AlarmAct } from '#shared/contract/http/alarm-acts.ts';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { Button } from '#src/components/ui/button.tsx';
import { t } from '#src/lib/messages/page-words.ts';
import { ActDialog, type AskedAct, isAsked } from './act-dialog.tsx';
import { titleOf, whereOf } from './alarm-names.ts';
import type { Offered } from './offered-acts.ts';
import { PHONE_TARGET } from './phone-target.ts';
import { useActs } from './use-acts.ts';

export type ActButtonsProps = {
  readonly alarms: readonly Alarm[];
  readonly kinds: readonly Offered[];
  readonly look?: 'plain' | 'quiet' | 'main';
  readonly touch?: boolean;
  readonly onDone?: () => void;
};

/** A button for each act; those that need to know something ask first. */
export function ActButtons({ alarms, kinds, look = 'plain', touch = false, onDone }: ActButtonsProps) {
  const acts = useActs();
  const [asked, setAsked] = useState<AskedAct>();
  const act = (act: AlarmAct) => {
    acts.mutate({ alarms, act });
    onDone?.();
  };
  const [only] = alarms;
  const nameOf = (kind: Offered) =>
    alarms.length === 1 && only !== undefined
      ? t('act.named', { act: t(`act.${kind}`), title: titleOf(only), where: whereOf(only) })
      : t(`act.${kind}`);
  return (
    <>
      {kinds.map((kind) => (
        <Button
          key={kind}
          look={look}
          touch={touch}
          className={touch ? 'w-full' : PHONE_TARGET}
          aria-label={nameOf(kind)}
          aria-haspopup={isAsked(kind) ? 'dialog' : undefined}
          onClick={() => (isAsked(kind) ? setAsked(kind) : act({ kind }))}
        >
          {t(`act.${kind}`)}
        </Button>
      ))}
      {asked === undefined ? null : (
        <ActDialog kind={asked} alarms={alarms} onAct={act} onCancel={() => setAsked(undefined)} />
      )}
    </>
  );
}
