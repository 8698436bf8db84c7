import type { FormEvent, ReactNode } from 'react';
import { Button } from '#src/components/ui/button.tsx';
import { t } from '#src/lib/messages/page-words.ts';

export type ActFormProps = {
  readonly save: string;
  readonly detail?: string;
  readonly onSave: () => void;
  readonly onCancel: () => void;
  readonly children: ReactNode;
};

/** A question before something is done: what it needs to know, the one button that does it, the way out. */
export function ActForm({ save, detail, onSave, onCancel, children }: ActFormProps) {
  const submit = (event: FormEvent) => {
    event.preventDefault();
    onSave();
  };
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      {children}
      {detail === undefined ? null : <p className="max-w-prose text-ink-2">{detail}</p>}
      <div className="flex flex-wrap gap-2">
        <Button type="submit" look="main" touch>
          {save}
        </Button>
        <Button touch onClick={onCancel}>
          {t('act.cancel')}
        </Button>
      </div>
    </form>
  );
}
