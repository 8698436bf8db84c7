import type { ComponentType } from 'react';
import type { AlarmAct } from '#shared/contract/http/alarm-acts.ts';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { Dialog } from '#src/components/ui/dialog.tsx';
import { t } from '#src/lib/messages/page-words.ts';
import { titleOf, whereOf } from './alarm-names.ts';
import { AnswerForm } from './answer-form.tsx';
import { AssignForm } from './assign-form.tsx';
import { DoneForm } from './done-form.tsx';
import { HoldForm } from './hold-form.tsx';
import type { Offered } from './offered-acts.ts';
import { ServiceForm } from './service-form.tsx';

/** What a form asks about, and what it answers. */
export type ActAsked = {
  readonly alarms: readonly Alarm[];
  readonly onAct: (act: AlarmAct) => void;
  readonly onCancel: () => void;
};

export type AskedAct = Exclude<Offered, 'unshelve' | 'unassign' | 'return-to-service'>;

const FORMS: Readonly<Record<AskedAct, ComponentType<ActAsked>>> = {
  shelve: HoldForm,
  'take-out-of-service': ServiceForm,
  'nothing-to-do': AnswerForm,
  assign: AssignForm,
  'work-off': DoneForm,
};

/** Whether an act needs to know something before it is done. */
export const isAsked = (kind: Offered): kind is AskedAct => kind in FORMS;

/** Asks what an act needs to know, about one alarm or several. */
export function ActDialog({ kind, alarms, onAct, onCancel }: ActAsked & { readonly kind: AskedAct }) {
  const Form = FORMS[kind];
  const [only] = alarms;
  const about =
    alarms.length === 1 && only !== undefined
      ? t('act.of', { title: titleOf(only), where: whereOf(only) })
      : t('act.about', { count: alarms.length });
  return (
    <Dialog title={t(`act.title.${kind}`)} onClose={onCancel}>
      <p className="mb-4 font-medium">{about}</p>
      <Form
        alarms={alarms}
        onAct={(act) => {
          onAct(act);
          onCancel();
        }}
        onCancel={onCancel}
      />
    </Dialog>
  );
}
