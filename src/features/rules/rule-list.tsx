import { useState } from 'react';
import type { RuleLayer } from '#shared/contract/http/rules.ts';
import { DETECTOR_CLASSES } from '#shared/domain/detectors/detector-classes.data.ts';
import type { FoldedDetector } from '#shared/domain/detectors/detector-defaults.data.ts';
import { FOLDED_DETECTORS } from '#shared/domain/detectors/figure-limits.ts';
import { PriorityMark } from '#src/components/ui/priority-mark.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { ruleName, ruleSays, t } from '#src/lib/messages/rules-words.ts';
import { countSet, type Draft, type RuleDraft } from './rule-draft.ts';
import { RuleForm } from './rule-form.tsx';

export type RuleListProps = {
  readonly layer: RuleLayer;
  /** Everything else that is set, to say where a rule differs too. */
  readonly others: readonly RuleLayer[];
  readonly draft: Draft;
  readonly onChange: (draft: Draft) => void;
  readonly readOnly: boolean;
};

/** Every rule in plain words, with what is set for it here and elsewhere; one opens to be changed. */
export function RuleList({ layer, others, draft, onChange, readOnly }: RuleListProps) {
  return (
    <Sheet id="rules" title={t('rules.list')}>
      {FOLDED_DETECTORS.map((detector) => (
        <RuleItem
          key={detector}
          detector={detector}
          layer={layer}
          elsewhere={others.filter(({ rules }) => rules[detector] !== undefined).map(({ name }) => name)}
          draft={draft[detector]}
          onChange={(rule) => onChange({ ...draft, [detector]: rule })}
          readOnly={readOnly}
        />
      ))}
    </Sheet>
  );
}

type RuleItemProps = {
  readonly detector: FoldedDetector;
  readonly layer: RuleLayer;
  readonly elsewhere: readonly string[];
  readonly draft: RuleDraft;
  readonly onChange: (draft: RuleDraft) => void;
  readonly readOnly: boolean;
};

const NAMED = 3;

function RuleItem({ detector, layer, elsewhere, draft, onChange, readOnly }: RuleItemProps) {
  const [open, setOpen] = useState(false);
  const above = layer.inherited[detector];
  const isOff = draft.enabled === '' ? above?.enabled === false : draft.enabled === 'off';
  const priority = draft.priority === '' ? (above?.priority ?? DETECTOR_CLASSES[detector].priority) : draft.priority;
  const set = countSet(draft);
  const marks = [
    isOff ? t('rules.off') : undefined,
    set > 0 ? t('rules.changedHere', { count: set }) : undefined,
    above === undefined ? undefined : t('rules.changedAbove'),
    elsewhere.length === 0 ? undefined : t('rules.changedIn', { names: listNames(elsewhere) }),
  ].filter((mark) => mark !== undefined);
  return (
    <details
      open={open}
      onToggle={(event) => setOpen(event.currentTarget.open)}
      className="border-t border-rule first:border-0"
    >
      <summary className="cursor-pointer px-4 py-3 sm:px-5">
        <span className="text-17 font-semibold">{ruleName(detector)}</span>
        <span className="ml-2 inline-flex items-center gap-1.5 whitespace-nowrap align-middle text-13 text-ink-2">
          <PriorityMark kind={priority} acknowledged decorative />
          {t(`mark.${priority}`)}
        </span>
        <span className="ml-2 text-13 text-ink-2">{marks.length === 0 ? t('rules.usual') : marks.join(' · ')}</span>
        <span className="block text-15 text-ink-2">{ruleSays(detector)}</span>
      </summary>
      {open ? (
        <RuleForm
          detector={detector}
          draft={draft}
          inherited={layer.inherited}
          onChange={onChange}
          readOnly={readOnly}
          isFirst={layer.scope.kind === 'company'}
        />
      ) : null}
    </details>
  );
}

const listNames = (names: readonly string[]): string =>
  names.length <= NAMED ? names.join('; ') : `${names.slice(0, NAMED).join('; ')} …`;
